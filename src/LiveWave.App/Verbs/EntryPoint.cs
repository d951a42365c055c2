using System.CommandLine;
using LiveWave.Abstractions;

namespace LiveWave.App;

/// <summary>From arguments to an exit code: what is wrong is said in lines for people, never as a stack trace.</summary>
internal static class EntryPoint
{
    /// <param name="args">As given.</param>
    /// <param name="isTerminal">The output is a terminal: somebody may be looking.</param>
    public static int Run(string[] args, bool isTerminal = false)
    {
        try
        {
            var parsed = CommandTree.Build(WatchVerb.Run, SynthVerb.Run, isTerminal).Parse(args);
            return parsed.Errors.Count == 0 ? parsed.Invoke(OwnErrors()) : Refuse(parsed);
        }
        catch (RefusedException refused)
        {
            foreach (var line in refused.Message.Split('\n')) Console.Error.WriteLine($"livewave: {line}");
            return ExitCode.Refused;
        }
        catch (Exception error)
        {
            Console.Error.WriteLine($"livewave: failed: {error.Message}");
            return ExitCode.Failed;
        }
    }

    private static InvocationConfiguration OwnErrors() => new()
    {
        EnableDefaultExceptionHandler = false,   // it prints a trace and ends with 1
        ProcessTerminationTimeout = null,        // signals are the run's own business
    };

    private static int Refuse(ParseResult parsed)
    {
        foreach (var error in parsed.Errors) Console.Error.WriteLine($"livewave: {error.Message}");
        Console.Error.WriteLine("livewave: see --help");
        return ExitCode.Refused;
    }
}
