namespace LiveWave.Display.Tests;

public sealed class TerminalTraitsTests
{
    [Theory]
    [InlineData("xterm-256color", "truecolor", "", ColourDepth.Full)]
    [InlineData("xterm-256color", "24bit", "", ColourDepth.Full)]
    [InlineData("xterm-direct", "", "", ColourDepth.Full)]
    [InlineData("tmux-256color", "", "", ColourDepth.TwoHundredFiftySix)]
    [InlineData("linux", "", "", ColourDepth.Sixteen)]
    [InlineData("vt220", "", "", ColourDepth.None)]
    [InlineData("xterm-256color", "truecolor", "1", ColourDepth.None)]
    public void A_screen_shows_the_colours_its_environment_promises(string term, string colorTerm, string noColor, ColourDepth expected)
    {
        var traits = TerminalTraits.Of(isTerminal: true, Variables(term, colorTerm, noColor));

        Assert.Equal(new TerminalTraits(IsScreen: true, expected), traits);
    }

    [Theory]
    [InlineData(true, "dumb")]
    [InlineData(true, "")]
    [InlineData(false, "xterm-256color")]
    public void What_is_no_terminal_or_a_dumb_one_gets_lines(bool isTerminal, string term)
    {
        var traits = TerminalTraits.Of(isTerminal, Variables(term, "truecolor", ""));

        Assert.Equal(new TerminalTraits(IsScreen: false, ColourDepth.None), traits);
    }

    private static Func<string, string?> Variables(string term, string colorTerm, string noColor) => name => name switch
    {
        "TERM" => term,
        "COLORTERM" => colorTerm,
        "NO_COLOR" => noColor,
        _ => null,
    };
}
