using System.CommandLine;
using System.Globalization;

namespace LiveWave.App;

/// <summary>The options that <c>demo</c> and <c>watch</c> share.</summary>
internal sealed class CommonOptions
{
    private const int MostBlockRows = 1_000_000;

    private readonly Option<double?> _seconds = new("--seconds")
    {
        Description = "Judge so many seconds of the stream, then end. Everything, if not given.",
        HelpName = "N",
    };

    private readonly Option<string?> _clock = new("--clock")
    {
        Description = "'real' plays at the pace of the recording, 'fast' as fast as it can be judged. Decisions are the same. "
            + "'fast' if not given, 'real' with --view terminal.",
    };

    private readonly Option<int> _blockRows = new("--block-rows")
    {
        Description = "Rows in a block, as an amplifier would deliver them. Decisions are the same; pulses can be late if blocks last longer than a rule's lead.",
        DefaultValueFactory = _ => 10,
        HelpName = "N",
    };

    private readonly Option<string?> _out = new("--out")
    {
        Description = "The session folder: absent or empty. A new one in the folder that the sheet's [record] names, if not given.",
        HelpName = "DIR",
    };

    private readonly Option<bool> _json = new("--json") { Description = "Print the summary as JSON." };

    private readonly Option<string?> _view = new("--view")
    {
        Description = "What to look at while it runs: 'terminal' or 'none'. 'terminal' if not given, where the output is one and --clock is real.",
    };

    private readonly bool _isTerminal;

    /// <param name="isTerminal">The output is a terminal: somebody may be looking.</param>
    public CommonOptions(bool isTerminal)
    {
        _isTerminal = isTerminal;
        _clock.AcceptOnlyFromAmong("real", "fast");
        _view.AcceptOnlyFromAmong("terminal", "none");
        _out.Validators.Add(result =>
        {
            if (result.Tokens.Count > 0 && string.IsNullOrWhiteSpace(result.Tokens[0].Value)) result.AddError("--out needs a folder");
        });
        SessionId.Validators.Add(result =>
        {
            if (result.Tokens.Count > 0 && !IsPlain(result.Tokens[0].Value)) result.AddError("--session-id takes letters, digits, '-', '_' and '.'");
        });
        _seconds.Validators.Add(result =>
        {
            // What is no number at all is the parser's to say.
            if (double.TryParse(result.Tokens[0].Value, CultureInfo.InvariantCulture, out var seconds) && !(seconds > 0 && double.IsFinite(seconds)))
            {
                result.AddError("--seconds must be above 0");
            }
        });
        _blockRows.Validators.Add(result =>
        {
            if (result.Tokens.Count > 0 && int.TryParse(result.Tokens[0].Value, CultureInfo.InvariantCulture, out var rows) && rows is < 1 or > MostBlockRows)
            {
                result.AddError($"--block-rows must be from 1 to {MostBlockRows}");
            }
        });
    }

    /// <summary>The id names a folder and keys lots.</summary>
    private static bool IsPlain(string id) => id.Length is > 0 and <= 100 && id[0] != '.' && id.All(c => char.IsAsciiLetterOrDigit(c) || c is '-' or '_' or '.');

    public Option<string?> SessionId { get; } = new("--session-id")
    {
        Description = "Repeats a session's lots, for a re-run. If not given: 'demo' has a fixed one, 'watch' makes one of name and time.",
        HelpName = "ID",
    };

    public void AddTo(Command command)
    {
        command.Validators.Add(result =>
        {
            if (result.GetValue(_json) && result.GetValue(_view) == "terminal") result.AddError("--json and --view terminal do not go together");
        });
        foreach (var option in (Option[])[_seconds, _clock, _blockRows, _out, _json, _view, SessionId]) command.Options.Add(option);
    }

    public WatchOptions Read(ParseResult parsed, string verb, string sheet, string? from) => new()
    {
        Verb = verb,
        SheetPath = sheet,
        From = from,
        Seconds = parsed.GetValue(_seconds) ?? double.NaN,
        IsRealClock = (parsed.GetValue(_clock) ?? (parsed.GetValue(_view) == "terminal" ? "real" : "fast")) == "real",
        HasView = (parsed.GetValue(_view) ?? DefaultView(parsed)) == "terminal",
        BlockRows = parsed.GetValue(_blockRows),
        Out = parsed.GetValue(_out),
        Json = parsed.GetValue(_json),
        SessionId = parsed.GetValue(SessionId),
    };

    private string DefaultView(ParseResult parsed) =>
        _isTerminal && !parsed.GetValue(_json) && parsed.GetValue(_clock) == "real" ? "terminal" : "none";
}
