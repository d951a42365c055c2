using System.Globalization;

namespace LiveWave.Recordings;

/// <summary>One time-stamped list of annotations of EDF+: onset, perhaps a duration, texts.
/// <c>±seconds [0x15 duration] 0x14 text 0x14 [text 0x14 …]</c></summary>
internal readonly ref struct EdfTal
{
    private const byte End = 0x14;
    private const byte Duration = 0x15;

    // 30 years: what lies beyond is damage, and would take row numbers with it.
    private const double MostSeconds = 1e9;
    private const int MostOnsetBytes = 32;

    private EdfTal(double onsetSeconds, ReadOnlySpan<byte> texts, bool hasDuration)
    {
        OnsetSeconds = onsetSeconds;
        Texts = texts;
        IsTimeKeeping = !hasDuration && (texts.IsEmpty || texts[0] == End);
    }

    /// <summary>Seconds from the start of the file.</summary>
    public double OnsetSeconds { get; }

    /// <summary>The texts, each with its end mark; UTF-8.</summary>
    public ReadOnlySpan<byte> Texts { get; }

    /// <summary>Without a duration, its first text empty: as the first list of a record, it says when the record begins.</summary>
    public bool IsTimeKeeping { get; }

    /// <summary>Reads one list.</summary>
    /// <param name="bytes">Without the 0x00 behind it.</param>
    /// <param name="tal">The list.</param>
    /// <returns>False if it is none.</returns>
    public static bool TryRead(ReadOnlySpan<byte> bytes, out EdfTal tal)
    {
        tal = default;
        var end = bytes.IndexOf(End);
        if (end < 0) return false;
        var onset = bytes[..end];
        var mark = onset.IndexOf(Duration);
        if (mark >= 0) onset = onset[..mark];
        if (!TrySeconds(onset, out var seconds)) return false;
        tal = new EdfTal(seconds, bytes[(end + 1)..], mark >= 0);
        return true;
    }

    /// <summary>Takes the next text.</summary>
    /// <param name="texts">As <see cref="Texts"/>; what is left afterwards.</param>
    /// <param name="text">The text; may be empty.</param>
    /// <returns>False if there is none, or what is left has no end mark.</returns>
    public static bool TryTake(ref ReadOnlySpan<byte> texts, out ReadOnlySpan<byte> text)
    {
        var end = texts.IndexOf(End);
        text = end < 0 ? default : texts[..end];
        if (end >= 0) texts = texts[(end + 1)..];
        return end >= 0;
    }

    private static bool TrySeconds(ReadOnlySpan<byte> bytes, out double seconds)
    {
        seconds = double.NaN;
        if (bytes.Length is < 2 or > MostOnsetBytes || bytes[0] is not ((byte)'+' or (byte)'-') || !char.IsAsciiDigit((char)bytes[1])) return false;
        return double.TryParse(bytes, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out seconds)
            && Math.Abs(seconds) < MostSeconds;
    }
}
