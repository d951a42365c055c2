using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>Shows a run on a terminal, ten times a second, on a thread of its own, <c>livewave:view</c>.</summary>
/// <remarks>It looks and never tells: rings and a snapshot come from the decision thread, nothing goes back, and a slow line or a
/// failing terminal delays the view alone.</remarks>
public sealed class TerminalView : IDisposable
{
    private static readonly TimeSpan FramePeriod = TimeSpan.FromMilliseconds(100);

    // Longer than a frame on any line that is worth looking at; a terminal that hangs must not hold the end of a run.
    private static readonly TimeSpan LongestGoodbye = TimeSpan.FromSeconds(1);

    private readonly ManualResetEventSlim _stop = new();
    private readonly SurfaceRings _rings;
    private readonly SessionPicture _picture;
    private readonly ViewParts _parts;
    private readonly ITerminal _terminal;
    private readonly IFace _face;
    private readonly PhaseSnapshot? _phases;
    private readonly Thread _thread;
    private readonly Phasors _frame;
    private long _shown;
    private bool _isDisposed;

    /// <summary>Begins to listen; nothing is drawn before <see cref="Start"/>.</summary>
    /// <param name="surface">What the run tells.</param>
    /// <param name="parts">What else it looks at.</param>
    /// <param name="terminal">Where to; the view's from now on, disposed with it.</param>
    public TerminalView(RunSurface surface, ViewParts parts, ITerminal terminal)
    {
        ArgumentNullException.ThrowIfNull(surface);
        ArgumentNullException.ThrowIfNull(parts);
        ArgumentNullException.ThrowIfNull(terminal);
        _parts = parts;
        _terminal = terminal;
        var facts = ViewFacts.Of(parts.Setup, parts.Limits, parts.Calibration, parts.Gate.PulsesAllowed);
        _picture = new SessionPicture(facts);
        _frame = new Phasors(facts.Patch.Channels.Count);
        _phases = facts.Track < parts.Phases.Count ? parts.Phases[facts.Track] : null;
        _face = terminal.IsScreen ? new ScreenFace(terminal) : new LineFace(terminal);
        _rings = new SurfaceRings(surface, parts.Loop, parts.Ledger);
        _thread = new Thread(Run) { Name = "livewave:view", IsBackground = true, Priority = ThreadPriority.BelowNormal };
    }

    /// <summary>What ended the view before its time, if something did; the run went on without it.</summary>
    public Exception? Failure { get; private set; }

    /// <summary>Begins to draw.</summary>
    public void Start() => _thread.Start();

    /// <summary>Stops listening and drawing, and gives the terminal back.</summary>
    public void Dispose()
    {
        if (_isDisposed) return;
        _isDisposed = true;
        _rings.Dispose();
        _stop.Set();
        var isOver = !_thread.IsAlive || _thread.Join(LongestGoodbye);
        _terminal.Dispose();
        if (isOver) _stop.Dispose();
    }

    /// <summary>One look: takes what came, and shows it. The view's thread, or a test.</summary>
    internal void Look()
    {
        _rings.DrainInto(_picture);
        _picture.Gate = new GateGlance(_parts.Gate.State, _parts.Gate.PulsesUsed, _parts.Gate.DisarmReason);
        if (_phases is not null && _phases.Written != _shown && _phases.TryRead(_frame, out _shown)) _picture.Take(_frame);
        _face.Show(_picture);
    }

    private void Run()
    {
        try
        {
            do Look();
            while (!_stop.Wait(FramePeriod));
            Look();
        }
        catch (Exception error)
        {
            Failure = error;
        }
    }
}
