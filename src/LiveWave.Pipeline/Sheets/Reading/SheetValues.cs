using System.Globalization;

namespace LiveWave.Pipeline;

/// <summary>What single values of a sheet may be, and how messages write them.</summary>
internal static class SheetValues
{
    private const int LongestShown = 60;

    /// <summary>A name may stand in file names, tables and on one line of a screen.</summary>
    public static bool IsName(string name) =>
        name.Length is >= 1 and <= 60
        && name[0] is not (' ' or '.') && name[^1] is not (' ' or '.')
        && name.All(IsPlain);

    /// <summary>Finite, and between the key's limits.</summary>
    public static bool IsInRange(SheetKey key, double number) =>
        double.IsFinite(number) && (key.IsLowExcluded ? number > key.Low : number >= key.Low) && number <= key.High;

    /// <summary>A number as a sheet would have it.</summary>
    public static string Written(double number) => number.ToString("R", CultureInfo.InvariantCulture);

    /// <summary>A text on one line, cut short.</summary>
    public static string Quoted(string text) => $"'{Plain(text)}'";

    /// <summary>A text on one line, cut short, without quotes.</summary>
    public static string Plain(string text)
    {
        var shown = string.Concat(text.Take(LongestShown).Select(c => char.IsControl(c) ? '·' : c));
        return text.Length > LongestShown ? shown + "..." : shown;
    }

    /// <summary>A number behind what it is, for messages; nothing for other values.</summary>
    public static string Shown(object? content) => content is double number ? ", " + Written(number) : "";

    private static bool IsPlain(char c) =>
        !"/\\:*?\"<>|".Contains(c, StringComparison.Ordinal)
        && char.GetUnicodeCategory(c) is not (UnicodeCategory.Control or UnicodeCategory.Format
            or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator);
}
