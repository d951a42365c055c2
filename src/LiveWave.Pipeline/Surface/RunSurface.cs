using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What a run tells: views, recorders, streams out and plug-ins compose on it with System.Reactive. It never decides.</summary>
/// <remarks>Published from the decision thread after a block is judged. On <see cref="Blocks"/> use only operators that keep
/// nothing (<c>Where</c>, <c>Select</c>, <c>Do</c>): a block is lent.</remarks>
public sealed class RunSurface
{
    private readonly StatusBoard _board;

    /// <summary>Makes a surface that nobody listens to yet.</summary>
    /// <param name="board">Where failures of observers are reported.</param>
    public RunSurface(StatusBoard board)
    {
        ArgumentNullException.ThrowIfNull(board);
        _board = board;
        Blocks = new Tap<SampleBlock>("blocks", Report);
        Readings = new Tap<Reading>("readings", Report);
        Events = new Tap<WaveEvent>("events", Report);
        Decisions = new Tap<Decision>("decisions", Report);
        Verdicts = new Tap<Verdict>("verdicts", Report);
        Status = new Tap<Status>("status", Report);
    }

    /// <summary>Blocks as received, lent.</summary>
    public Tap<SampleBlock> Blocks { get; }

    /// <summary>Readings, frame by frame.</summary>
    public Tap<Reading> Readings { get; }

    /// <summary>Wave events: when one begins to pass and when it is over.</summary>
    public Tap<WaveEvent> Events { get; }

    /// <summary>Decisions.</summary>
    public Tap<Decision> Decisions { get; }

    /// <summary>Decisions with their outcomes, as these arrive.</summary>
    public Tap<Verdict> Verdicts { get; }

    /// <summary>What people should know.</summary>
    public Tap<Status> Status { get; }

    /// <summary>The run is over.</summary>
    public void Complete()
    {
        Blocks.Complete();
        Readings.Complete();
        Events.Complete();
        Decisions.Complete();
        Verdicts.Complete();
        Status.Complete();
    }

    private void Report(string what, Exception error) =>
        _board.Post(StatusLevel.Warning, "surface", $"{what}: {error.Message}", "the run goes on without it");
}
