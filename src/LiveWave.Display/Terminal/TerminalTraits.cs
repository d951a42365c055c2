namespace LiveWave.Display;

/// <summary>What a terminal can do, as far as its environment says.</summary>
/// <param name="IsScreen">It can be drawn on: it is a terminal, and not a dumb one.</param>
/// <param name="Colours">The colours it shows.</param>
internal readonly record struct TerminalTraits(bool IsScreen, ColourDepth Colours)
{
    /// <summary>Reads the environment.</summary>
    /// <param name="isTerminal">The output is a terminal, no file and no pipe.</param>
    /// <param name="variable">A variable's value by its name; null if it is not set.</param>
    public static TerminalTraits Of(bool isTerminal, Func<string, string?> variable)
    {
        var kind = variable("TERM") ?? "";
        var isModernWindows = !string.IsNullOrEmpty(variable("WT_SESSION"));
        if (!isTerminal || kind == "dumb" || (kind.Length == 0 && !isModernWindows)) return new TerminalTraits(IsScreen: false, ColourDepth.None);
        if (!string.IsNullOrEmpty(variable("NO_COLOR"))) return new TerminalTraits(IsScreen: true, ColourDepth.None);
        return new TerminalTraits(IsScreen: true, Depth(kind, variable("COLORTERM") ?? "", isModernWindows));
    }

    private static ColourDepth Depth(string kind, string colours, bool isModernWindows)
    {
        if (isModernWindows || colours is "truecolor" or "24bit" || kind.EndsWith("-direct", StringComparison.Ordinal)) return ColourDepth.Full;
        if (kind.Contains("256", StringComparison.Ordinal)) return ColourDepth.TwoHundredFiftySix;
        return kind.StartsWith("vt", StringComparison.Ordinal) ? ColourDepth.None : ColourDepth.Sixteen;   // those were monochrome
    }
}
