using System.Globalization;

namespace LiveWave.Pipeline;

/// <summary>How values stand in our tables: fixed decimals, a point, <c>n/a</c> for what is not known.</summary>
public static class Cell
{
    /// <summary>A number with fixed decimals.</summary>
    /// <param name="value">NaN and infinities become <c>n/a</c>.</param>
    /// <param name="decimals">0 to 9.</param>
    public static string Number(double value, int decimals)
    {
        if (!double.IsFinite(value)) return "n/a";
        var text = value.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return IsNegativeZero(text) ? text[1..] : text;
    }

    /// <summary>A whole number.</summary>
    /// <param name="value">The number.</param>
    public static string Whole(long value) => value.ToString(CultureInfo.InvariantCulture);

    /// <summary>A text without tabs and line ends; empty becomes <c>n/a</c>.</summary>
    /// <param name="text">The text.</param>
    public static string Text(string text) =>
        string.IsNullOrEmpty(text) ? "n/a" : text.Replace('\t', ' ').Replace('\n', ' ').Replace('\r', ' ');

    private static bool IsNegativeZero(string text) => text[0] == '-' && text.AsSpan(1).IndexOfAnyInRange('1', '9') < 0;
}
