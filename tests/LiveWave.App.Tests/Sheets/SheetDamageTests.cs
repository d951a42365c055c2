using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.App.Tests;

/// <summary>Whatever happens to a sheet, it is read or it is refused.</summary>
public sealed class SheetDamageTests
{
    private static readonly string[] Bits =
    [
        "", "[", "]", "[[", "{", "}", "=", ".", "\"", "'''", "\n", "\\", "#", ",", "0", "-1", "1e999", "nan", "true", "1979-05-27",
        "[x]\n", "[[band]]\n", "[rule]\n", "[band.wave.event]\n", "phase.order = 1\n", "\0", "\uFEFF", "\u2028", "é", "name = \"quill\"\n",
    ];

    [Property(Replay = "2026,1201", MaxTest = 2000)]
    public Property A_damaged_sheet_is_read_or_refused() => Prop.ForAll(Damaged.ToArbitrary(), text =>
    {
        var thrown = Record.Exception(() => SheetReader.Parse(text, "s.toml"));
        if (thrown is null) return true;

        var lines = Assert.IsType<RefusedException>(thrown).Message.Split('\n');
        var count = text.Split('\n').Length;
        return lines.All(line => int.TryParse(line.Split(':')[1], out var number) && number >= 1 && number <= count);
    });

    private static Gen<string> Damaged =>
        from wounds in Gen.Choose(1, 4).SelectMany(count => Wound.ListOf(count))
        select wounds.Aggregate(SheetTexts.Millrace, (text, wound) => wound(text));

    /// <summary>Cuts a stretch out, puts something in its place, or swaps two lines.</summary>
    private static Gen<Func<string, string>> Wound =>
        from at in Gen.Choose(0, 1_000_000)
        from length in Gen.Frequency((3, Gen.Choose(0, 5)), (1, Gen.Choose(0, 400)))
        from bit in Gen.Elements(Bits)
        from swap in Gen.Choose(0, 3)
        select (Func<string, string>)(text => swap == 0 ? Swapped(text, at, at + length) : Cut(text, at, length, bit));

    private static string Cut(string text, int at, int length, string bit)
    {
        var from = at % (text.Length + 1);
        var to = Math.Min(text.Length, from + length);
        return text[..from] + bit + text[to..];
    }

    private static string Swapped(string text, int one, int other)
    {
        var lines = text.Split('\n');
        var (a, b) = (one % lines.Length, other % lines.Length);
        (lines[a], lines[b]) = (lines[b], lines[a]);
        return string.Join('\n', lines);
    }
}
