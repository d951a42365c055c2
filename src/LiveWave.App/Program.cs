using LiveWave.Abstractions;
using LiveWave.App;

try
{
    var parsed = CommandTree.Build(WatchVerb.Run).Parse(args);
    if (parsed.Errors.Count > 0)
    {
        foreach (var error in parsed.Errors) Console.Error.WriteLine($"livewave: {error.Message}");
        Console.Error.WriteLine("livewave: see --help");
        return ExitCode.Refused;
    }

    return parsed.Invoke(new System.CommandLine.InvocationConfiguration { EnableDefaultExceptionHandler = false, ProcessTerminationTimeout = null });
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
