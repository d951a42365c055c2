namespace LiveWave.Recordings;

/// <summary>Text from a file, made fit for one line of a log or terminal.</summary>
internal static class PlainText
{
    private const int Longest = 80;

    /// <summary>Control characters become question marks, long text is cut.</summary>
    /// <param name="text">Any text.</param>
    public static string Of(string text)
    {
        var cut = text.Length > Longest ? string.Concat(text.AsSpan(0, Longest), "...") : text;
        return string.Create(cut.Length, cut, static (to, from) =>
        {
            for (var i = 0; i < to.Length; i++) to[i] = char.IsControl(from[i]) || from[i] is '\u2028' or '\u2029' ? '?' : from[i];
        });
    }
}
