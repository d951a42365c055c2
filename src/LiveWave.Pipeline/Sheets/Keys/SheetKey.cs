using System.Globalization;

namespace LiveWave.Pipeline;

/// <summary>One row of the key table: a key of the session sheet, what it takes and what it means.</summary>
/// <param name="Path">Tables and key, with dots: <c>band.wave.everyMs</c>.</param>
/// <param name="Type">What it takes.</param>
/// <param name="Meaning">One sentence, without its full stop.</param>
public sealed record SheetKey(string Path, SheetKeyType Type, string Meaning)
{
    /// <summary>The number's unit as people write it (<c>ms</c>, <c>m/s</c>); empty for texts, counts, fractions and ratios.</summary>
    public string Unit { get; init; } = "";

    /// <summary>The sheet must have it (a key: if its table is there; <see cref="SheetKeyType.Tables"/>: at least one).</summary>
    public bool IsRequired { get; init; }

    /// <summary>What counts where the sheet says nothing: a text, double, long or bool; null: nothing does.</summary>
    public object? Default { get; init; }

    /// <summary>In words, what happens where the sheet says nothing and there is no <see cref="Default"/>; may be empty.</summary>
    public string Otherwise { get; init; } = "";

    /// <summary>Least number allowed.</summary>
    public double Low { get; init; } = double.NegativeInfinity;

    /// <summary>Largest number allowed.</summary>
    public double High { get; init; } = double.PositiveInfinity;

    /// <summary>Only numbers above <see cref="Low"/> are allowed, not <see cref="Low"/> itself.</summary>
    public bool IsLowExcluded { get; init; }

    /// <summary>The only words (or, for a number, numbers as text) allowed; empty: no such limit.</summary>
    public IReadOnlyList<string> Words { get; init; } = [];

    /// <summary>Words that are known and will be allowed one day.</summary>
    public IReadOnlyList<string> WordsNotYet { get; init; } = [];

    /// <summary>It works in this version; otherwise it is refused as 'not yet'.</summary>
    public bool IsBuilt { get; init; } = true;

    /// <summary>The key itself: the last part of <see cref="Path"/>.</summary>
    public string Name => Path[(Path.LastIndexOf('.') + 1)..];

    /// <summary>The path of the table it stands in; empty for a table of the sheet itself.</summary>
    public string TablePath => Path[..Math.Max(0, Path.LastIndexOf('.'))];

    /// <summary>It is a table whose keys are rows of the key table too.</summary>
    public bool IsTable => Type is SheetKeyType.Table or SheetKeyType.Tables;

    /// <summary>The key as it is written in a sheet: <c>[session]</c>, <c>[[band.wave]]</c>, <c>everyMs</c>.</summary>
    public string Heading => Type switch
    {
        SheetKeyType.Table => $"[{Path}]",
        SheetKeyType.Tables => $"[[{Path}]]",
        _ => Name,
    };

    /// <summary>What is allowed, in words: <c>a number from 0 to 1</c>.</summary>
    public string Takes => Type switch
    {
        SheetKeyType.Table => $"one table [{Path}]",
        SheetKeyType.Tables => $"tables [[{Path}]]",
        SheetKeyType.Name => "a name of 1 to 60 printable characters, not / \\ : * ? \" < > | and no dot or space at its ends",
        SheetKeyType.Text when Words.Count > 0 => OneOf(Words.Select(word => $"\"{word}\"")),
        SheetKeyType.Text => "a text",
        SheetKeyType.Texts => "a list of texts, each different",
        SheetKeyType.Number when Words.Count > 0 => OneOf(Words) + InUnit,
        SheetKeyType.Number => "a number" + Range + InUnit,
        SheetKeyType.Whole => "a whole number" + Range + InUnit,
        SheetKeyType.Flag => "true or false",
        SheetKeyType.NamedNumbers => $"a table of names with a number each, as {{ name = 0 }}{InUnit}",
        _ => "a table of numbers, texts, true or false",
    };

    private string InUnit => Unit.Length == 0 ? "" : $" ({Unit})";

    private string Range => (double.IsFinite(Low), IsLowExcluded, double.IsFinite(High)) switch
    {
        (true, true, true) => $" above {Written(Low)}, at most {Written(High)}",
        (true, true, false) => $" above {Written(Low)}",
        (true, false, true) => $" from {Written(Low)} to {Written(High)}",
        (true, false, false) => $", at least {Written(Low)}",
        (false, _, true) => $", at most {Written(High)}",
        _ => "",
    };

    private static string OneOf(IEnumerable<string> words)
    {
        var all = words.ToArray();
        return all.Length == 1 ? all[0] : string.Join(", ", all[..^1]) + " or " + all[^1];
    }

    private static string Written(double number) => number.ToString("0.#########", CultureInfo.InvariantCulture);
}
