using System.Runtime.InteropServices;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Sees to it that every end of a run is disarmed and quiet: signals, and exceptions that nobody caught.</summary>
/// <remarks>Ctrl-C and TERM ask the run to end in order; HUP too. An unhandled exception, on whatever thread, brings the outputs to
/// rest first, then writes <c>crash.txt</c> and ends the process with code 3.</remarks>
internal sealed class RunGuard : IDisposable
{
    private readonly PulseGate _gate;
    private readonly SessionFolder _folder;
    private readonly List<PosixSignalRegistration> _signals = [];

    public RunGuard(PulseGate gate, SessionFolder folder, Action stop)
    {
        _gate = gate;
        _folder = folder;
        foreach (var signal in (PosixSignal[])[PosixSignal.SIGINT, PosixSignal.SIGTERM, PosixSignal.SIGHUP])
        {
            _signals.Add(PosixSignalRegistration.Create(signal, context =>
            {
                context.Cancel = true;
                gate.Disarm($"signal {context.Signal}");
                stop();
            }));
        }

        AppDomain.CurrentDomain.UnhandledException += OnUnhandled;
    }

    /// <summary>Writes what is known about a crash; never throws.</summary>
    public static void WriteCrash(SessionFolder folder, Exception error)
    {
        try
        {
            File.WriteAllText(folder.At("crash.txt"), CrashText(error));
        }
        catch (Exception inner) when (inner is IOException or UnauthorizedAccessException)
        {
            Console.Error.WriteLine($"livewave: crash.txt could not be written: {inner.Message}");
        }
    }

    public void Dispose()
    {
        AppDomain.CurrentDomain.UnhandledException -= OnUnhandled;
        foreach (var signal in _signals) signal.Dispose();
    }

    private static string CrashText(Exception error) =>
        "LiveWave ended because of an error that nobody foresaw. The outputs were brought to rest.\n"
        + "Everything written before stands in this folder. Please report this page.\n\n"
        + $"what: {error.GetType().Name}: {error.Message}\n\n{error.StackTrace}\n";

    private void OnUnhandled(object sender, UnhandledExceptionEventArgs happened)
    {
        _gate.End("unhandled exception");
        if (happened.ExceptionObject is Exception error)
        {
            WriteCrash(_folder, error);
            Console.Error.WriteLine($"livewave: failed: {error.Message}; see crash.txt in {_folder.FullPath}");
        }

        Environment.Exit(ExitCode.Failed);
    }
}
