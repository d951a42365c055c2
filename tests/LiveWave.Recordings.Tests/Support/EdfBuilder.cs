using System.Text;

namespace LiveWave.Recordings.Tests;

/// <summary>Writes EDF and BDF in memory, right or wrong, field by field.</summary>
internal sealed class EdfBuilder(bool isBdf = false)
{
    /// <summary>Stands in every field that nobody may ever see.</summary>
    public const string Secret = "Quill";

    private readonly List<string[]> _signals = [];
    private readonly List<byte> _records = [];
    private int _recordCount;

    public string Reserved { get; init; } = "";

    public string RecordSeconds { get; init; } = "1";

    public string? Records { get; init; }

    public string? HeaderBytes { get; init; }

    public int HeaderLength => 256 * (_signals.Count + 1);

    public byte[] Bytes => [.. Header(), .. _records];

    public static EdfBuilder Plus(string kind, string recordSeconds = "1") => new() { Reserved = "EDF+" + kind, RecordSeconds = recordSeconds };

    /// <summary>The list that tells when a record begins.</summary>
    public static string Time(string onset) => $"{onset}\u0014\u0014\0";

    /// <summary>What a signal has in a record.</summary>
    public static int[] Numbers(params int[] numbers) => numbers;

    public static byte[] With(byte[] bytes, int at, string text)
    {
        var changed = (byte[])bytes.Clone();
        Encoding.Latin1.GetBytes(text).CopyTo(changed, at);
        return changed;
    }

    public EdfBuilder Signal(
        string label, int samples, string unit = "uV", string low = "-32768", string high = "32767", string? digitalLow = null, string? digitalHigh = null)
    {
        var lowest = isBdf ? "-8388608" : "-32768";
        var highest = isBdf ? "8388607" : "32767";
        _signals.Add([label, Secret, unit, low, high, digitalLow ?? lowest, digitalHigh ?? highest, Secret, Number(samples), Secret]);
        return this;
    }

    public EdfBuilder Annotations(int samples = 20) => Signal(isBdf ? "BDF Annotations" : "EDF Annotations", samples, "", "-1", "1");

    /// <summary>A data record: of each signal its numbers, or of annotations their text.</summary>
    public EdfBuilder Record(params object[] signals)
    {
        Assert.Equal(_signals.Count, signals.Length);
        for (var i = 0; i < signals.Length; i++)
        {
            var bytes = signals[i] is int[] numbers ? [.. numbers.SelectMany(Sample)] : Text(signals[i]);
            Array.Resize(ref bytes, int.Parse(_signals[i][8], null) * (isBdf ? 3 : 2));
            _records.AddRange(bytes);
        }

        _recordCount++;
        return this;
    }

    public EdfBuilder Raw(params byte[] bytes)
    {
        _records.AddRange(bytes);
        return this;
    }

    private static byte[] Text(object text) => text as byte[] ?? Encoding.UTF8.GetBytes((string)text);

    private static string Number(int number) => number.ToString(System.Globalization.CultureInfo.InvariantCulture);

    private byte[] Sample(int value) => BitConverter.GetBytes(value)[..(isBdf ? 3 : 2)];

    private byte[] Header()
    {
        int[] widths = [16, 80, 8, 8, 8, 8, 8, 80, 8, 32];
        var text = new StringBuilder(isBdf ? "\u00FFBIOSEMI" : "0       ");
        text.Append(Secret.PadRight(80)).Append(Secret.PadRight(80)).Append("05.03.2112.30.00");
        text.Append((HeaderBytes ?? Number(HeaderLength)).PadRight(8)).Append(Reserved.PadRight(44));
        text.Append((Records ?? Number(_recordCount)).PadRight(8)).Append(RecordSeconds.PadRight(8)).Append(Number(_signals.Count).PadRight(4));
        for (var field = 0; field < widths.Length; field++)
        {
            foreach (var signal in _signals) text.Append(signal[field].PadRight(widths[field]));
        }

        return Encoding.Latin1.GetBytes(text.ToString());
    }
}
