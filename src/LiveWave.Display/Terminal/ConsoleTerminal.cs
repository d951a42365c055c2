using System.Runtime.InteropServices;
using System.Text;

namespace LiveWave.Display;

/// <summary>The terminal the program was started in. While it is open the view has a screen of its own and the cursor is hidden.</summary>
/// <remarks>What was there before comes back on every end: dispose, exit, unhandled exception. Only a kill that no program can catch
/// leaves it as it is; then <c>reset</c> helps. Ctrl-Z does nothing: a run that is suspended would miss its instants.</remarks>
public sealed class ConsoleTerminal : ITerminal
{
    // The other screen, no cursor, and no going on in the next line after the last column.
    private const string Enter = "\e[?1049h\e[?25l\e[?7l";
    private const string Leave = "\e[0m\e[?7h\e[?25h\e[?1049l";

    private static readonly TimeSpan LongestWait = TimeSpan.FromSeconds(1);

    private readonly Stream _out = Console.OpenStandardOutput();
    private readonly Lock _writing = new();
    private readonly List<PosixSignalRegistration> _signals = [];
    private byte[] _bytes = new byte[32 * 1024];
    private bool _isOpen;
    private volatile bool _wasAway;

    /// <summary>Opens the terminal; a pipe, a file or a dumb terminal is left as it is.</summary>
    public ConsoleTerminal()
    {
        (IsScreen, Colours) = TerminalTraits.Of(!Console.IsOutputRedirected, Environment.GetEnvironmentVariable);
        if (!IsScreen) return;
        AppDomain.CurrentDomain.ProcessExit += OnExit;
        AppDomain.CurrentDomain.UnhandledException += OnUnhandled;
        if (!OperatingSystem.IsWindows())
        {
            _signals.Add(PosixSignalRegistration.Create(PosixSignal.SIGTSTP, static context => context.Cancel = true));
            _signals.Add(PosixSignalRegistration.Create(PosixSignal.SIGCONT, _ => _wasAway = true));
        }

        Switch(toOpen: true);
    }

    /// <inheritdoc/>
    public ColourDepth Colours { get; }

    /// <inheritdoc/>
    public bool IsScreen { get; }

    /// <inheritdoc/>
    /// <remarks>0 for one call after the program was stopped and continued: the picture must be told anew.</remarks>
    public (int Columns, int Rows) Size()
    {
        if (_wasAway)
        {
            _wasAway = false;
            return (0, 0);
        }

        try
        {
            return (Console.WindowWidth, Console.WindowHeight);
        }
        catch (IOException)
        {
            return (0, 0);
        }
    }

    /// <inheritdoc/>
    public void Write(ReadOnlySpan<char> text)
    {
        lock (_writing)
        {
            if (IsScreen && !_isOpen) return;   // closed by another thread
            Send(text);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        AppDomain.CurrentDomain.ProcessExit -= OnExit;
        AppDomain.CurrentDomain.UnhandledException -= OnUnhandled;
        foreach (var signal in _signals) signal.Dispose();
        Switch(toOpen: false);
        _out.Dispose();
    }

    private void OnExit(object? sender, EventArgs nothing) => Switch(toOpen: false);

    private void OnUnhandled(object sender, UnhandledExceptionEventArgs happened) => Switch(toOpen: false);

    private void Switch(bool toOpen)
    {
        // A write that hangs holds the lock; the end of a run must not wait for it.
        if (!IsScreen || !_writing.TryEnter(LongestWait)) return;
        try
        {
            if (_isOpen == toOpen) return;
            _isOpen = toOpen;
            Send(toOpen ? Enter : Leave);
        }
        finally
        {
            _writing.Exit();
        }
    }

    private void Send(ReadOnlySpan<char> text)
    {
        var most = Encoding.UTF8.GetMaxByteCount(text.Length);
        if (_bytes.Length < most) _bytes = new byte[most];
        var length = Encoding.UTF8.GetBytes(text, _bytes);
        try
        {
            _out.Write(_bytes, 0, length);
            _out.Flush();
        }
        catch (Exception error) when (error is IOException or ObjectDisposedException)
        {
            // Whoever looked has gone; the run does not mind.
        }
    }
}
