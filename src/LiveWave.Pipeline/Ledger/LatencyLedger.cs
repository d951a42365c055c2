using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The latency budget of a run: how long each stage took, for every block, decision and outcome.</summary>
/// <remarks>One writer, the decision thread; read after the run. Computing times are real also where the clock is virtual.</remarks>
public sealed class LatencyLedger
{
    private readonly StageHistogram _acquired = new("acquired to received");
    private readonly StageHistogram _phased;
    private readonly StageHistogram _read;
    private readonly StageHistogram _decided;
    private readonly StageHistogram _lead = new("decided to due");
    private readonly StageHistogram _late = new("due to sent, late ones left out");
    private readonly StageHistogram _block;

    /// <summary>Makes an empty ledger.</summary>
    /// <param name="limits">The budget.</param>
    public LatencyLedger(BudgetLimits limits)
    {
        ArgumentNullException.ThrowIfNull(limits);
        _phased = new StageHistogram("received to phased, earlier rows of its block included", limits.PhasedMs);
        _read = new StageHistogram("phased to read", limits.ReadMs);
        _decided = new StageHistogram("read to decided", limits.DecidedMs);
        _block = new StageHistogram("received to judged, every block", limits.InAllMs);
        Stages = [_block, _acquired, _phased, _read, _decided, _lead, _late];
    }

    /// <summary>Every stage, in order.</summary>
    public IReadOnlyList<StageHistogram> Stages { get; }

    /// <summary>Computing of whole blocks: from received to the last row judged.</summary>
    public StageHistogram Blocks => _block;

    /// <summary>From the instant a pulse was due to the instant it was sent, or would have been.</summary>
    public StageHistogram Lateness => _late;

    /// <summary>Garbage collections of the process during the run.</summary>
    public int Collections { get; private set; }

    /// <summary>How long they stopped it, ms.</summary>
    public double PauseMs { get; private set; }

    /// <summary>Bytes that the decision thread allocated while it judged blocks.</summary>
    public long DecisionThreadBytes { get; internal set; }

    /// <summary>The run is over: what the process's garbage cost it.</summary>
    /// <param name="collections">Collections.</param>
    /// <param name="pause">How long they stopped it.</param>
    public void Process(int collections, TimeSpan pause)
    {
        Collections = collections;
        PauseMs = pause.TotalMilliseconds;
    }

    /// <summary>Computing time of the newest block, seconds; NaN before the first. For observers on the decision thread.</summary>
    public double NewestBlockSeconds { get; private set; } = double.NaN;

    /// <summary>A block was judged.</summary>
    /// <param name="seconds">Computing time.</param>
    public void Block(double seconds)
    {
        NewestBlockSeconds = seconds;
        _block.Record(seconds);
    }

    /// <summary>A decision was taken.</summary>
    /// <param name="stages">When it passed each stage so far, and when it is due.</param>
    public void Decision(in StageStamps stages)
    {
        _acquired.Record(stages.ReceivedSeconds - stages.AcquiredSeconds);
        _phased.Record(stages.PhasedSeconds - stages.ReceivedSeconds);
        _read.Record(stages.ReadSeconds - stages.PhasedSeconds);
        _decided.Record(stages.DecidedSeconds - stages.ReadSeconds);
        _lead.Record(stages.DueSeconds - stages.DecidedSeconds);
    }

    /// <summary>An outcome is known: one a decision and output.</summary>
    /// <param name="stages">When it passed each stage.</param>
    public void Outcome(in StageStamps stages) => _late.Record(stages.SentSeconds - stages.DueSeconds);
}
