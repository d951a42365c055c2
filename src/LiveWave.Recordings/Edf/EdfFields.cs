using System.Globalization;
using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads the fields of an EDF header: text of fixed width, padded with blanks.</summary>
/// <remarks>A damaged header may have what identifies a person where a number belongs; so of a field that is no number only
/// characters of numbers are shown.</remarks>
/// <param name="window">The file.</param>
/// <param name="path">As the user gave it.</param>
/// <param name="warnings">Told where a field was read against the letter of the format.</param>
internal sealed class EdfFields(FileWindow window, string path, ReadWarnings warnings)
{
    /// <summary>Bytes of every field that holds a number, but the number of signals.</summary>
    public const int NumberBytes = 8;

    private static readonly UTF8Encoding Strict = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Reads a text, without blanks around it; other than ASCII is taken for UTF-8, else for Latin-1.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="width">Its bytes.</param>
    /// <param name="field">Its name.</param>
    public string Text(long at, int width, string field)
    {
        var bytes = window.Peek(at, width).Trim("\0 "u8);
        if (Ascii.IsValid(bytes)) return Encoding.ASCII.GetString(bytes);
        string text;
        try
        {
            text = Strict.GetString(bytes);
        }
        catch (DecoderFallbackException)
        {
            text = Encoding.Latin1.GetString(bytes);
        }

        warnings.Add(at, $"{field} holds letters beyond ASCII", $"it is read as '{PlainText.Of(text)}'");
        return text;
    }

    /// <summary>Reads a whole number.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="width">Its bytes.</param>
    /// <param name="field">Its name.</param>
    /// <param name="low">Least value allowed.</param>
    /// <param name="high">Largest value allowed.</param>
    /// <exception cref="RefusedException">It is none, or not between the limits.</exception>
    public long Whole(long at, int width, string field, long low, long high)
    {
        if (TryWhole(at, width, out var value) && value >= low && value <= high) return value;
        throw Refusal(at, width, field, $"a whole number from {low} to {high} belongs there: the header is damaged, or this is another kind of file");
    }

    /// <summary>Reads a whole number if it is one.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="width">Its bytes.</param>
    /// <param name="value">The number.</param>
    public bool TryWhole(long at, int width, out long value) =>
        long.TryParse(window.Peek(at, width).Trim("\0 "u8), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out value);

    /// <summary>Reads a number if it is one: with a decimal point, or as a whole field with a decimal comma, which is warned of.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="field">Its name.</param>
    /// <returns>Finite, or NaN.</returns>
    public double Number(long at, string field)
    {
        const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;
        var bytes = window.Peek(at, NumberBytes).Trim("\0 "u8);
        if (double.TryParse(bytes, Style, CultureInfo.InvariantCulture, out var value)) return double.IsFinite(value) ? value : double.NaN;
        if (!IsWithComma(bytes)) return double.NaN;
        Span<byte> pointed = stackalloc byte[NumberBytes];
        bytes.CopyTo(pointed);
        pointed.Replace((byte)',', (byte)'.');
        value = double.Parse(pointed[..bytes.Length], Style, CultureInfo.InvariantCulture);
        warnings.Add(at, $"{field} '{Shown(at, NumberBytes)}' has a decimal comma", "it is read as a decimal point");
        return value;
    }

    /// <summary>Refuses the content of a field.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="width">Its bytes.</param>
    /// <param name="field">Its name.</param>
    /// <param name="advice">What belongs there.</param>
    /// <returns>To be thrown.</returns>
    public RefusedException Refusal(long at, int width, string field, string advice) =>
        new($"{field} is '{Shown(at, width)}'", $"{path}, byte {at}", advice);

    /// <summary>A field for a message; what is no character of a number is shown as a question mark.</summary>
    /// <param name="at">Its first byte.</param>
    /// <param name="width">Its bytes.</param>
    public string Shown(long at, int width)
    {
        var shown = new StringBuilder(width);
        foreach (var one in window.Peek(at, width).TrimEnd((byte)' ')) shown.Append("0123456789+-., eE".Contains((char)one, StringComparison.Ordinal) ? (char)one : '?');
        return shown.ToString();
    }

    private static bool IsWithComma(ReadOnlySpan<byte> bytes)
    {
        if (bytes.StartsWith("-"u8)) bytes = bytes[1..];
        var comma = bytes.IndexOf((byte)',');
        return comma > 0 && comma < bytes.Length - 1
            && !bytes[..comma].ContainsAnyExceptInRange((byte)'0', (byte)'9')
            && !bytes[(comma + 1)..].ContainsAnyExceptInRange((byte)'0', (byte)'9');
    }
}
