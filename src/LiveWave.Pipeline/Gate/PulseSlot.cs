using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The one place where a committed pulse or sham of an output waits, is sent or cancelled, and leaves its outcome.</summary>
/// <remarks>
/// empty → pending → (sending →) ending → done → empty. Every pulse ends in exactly one outcome, and none can be dropped:
/// <list type="bullet">
/// <item>Decision, stages and standing are written while the state is empty, which only the decision thread leaves; nobody
/// writes them afterwards until it is empty again.</item>
/// <item>Pending and sending are left by compare-and-swap only. Whoever wins the swap to ending is alone in writing the
/// outcome; the losers do nothing. There is one such swap a round, so one outcome a pulse.</item>
/// <item>The outcome lies in the slot itself until the decision thread has taken it: it always has room, and the slot
/// can't be filled before.</item>
/// </list>
/// </remarks>
internal sealed class PulseSlot
{
    private volatile SlotState _state;
    private Decision _decision;
    private StageStamps _stages;
    private GateStanding? _standing;
    private PauseMark _arrival;
    private double _dueSeconds;
    private double _sentSeconds;
    private Outcome _outcome;

    internal SlotState State => _state;

    /// <summary>When the pulse is due. Read without owning the slot it may already be the next pulse's: ask again after the claim.</summary>
    internal double DueSeconds => Volatile.Read(ref _dueSeconds);

    /// <summary>Owner of a claim: the decision.</summary>
    internal ref readonly Decision Decision => ref _decision;

    /// <summary>Owner of a claim: stamp of the deciding row.</summary>
    internal double AcquiredSeconds => _stages.AcquiredSeconds;

    /// <summary>Owner of a claim: the gate's standing when it was committed.</summary>
    internal GateStanding Standing => _standing!;

    /// <summary>The sender, before it asks the output: when that was. NaN until then.</summary>
    internal double SentSeconds
    {
        get => Volatile.Read(ref _sentSeconds);
        set => Volatile.Write(ref _sentSeconds, value);
    }

    /// <summary>Decision thread: puts a pulse or sham in, if the slot is empty.</summary>
    internal bool TryFill(in Decision decision, in StageStamps stages, GateStanding standing, in PauseMark arrival)
    {
        if (_state != SlotState.Empty) return false;
        _decision = decision;
        _stages = stages;
        _standing = standing;
        _arrival = arrival;
        Volatile.Write(ref _dueSeconds, decision.DueSeconds);
        SentSeconds = double.NaN;

        // A full fence, not only a release: the decision thread next looks whether the output ended or failed meanwhile,
        // and whoever ends it looks at this state after saying so. One of the two sees the other.
        _ = Interlocked.Exchange(ref _state, SlotState.Pending);
        return true;
    }

    /// <summary>Any thread: takes the slot from one state to the next, if it is still there. A full fence.</summary>
    internal bool TryClaim(SlotState from, SlotState to) => Interlocked.CompareExchange(ref _state, to, from) == from;

    /// <summary>The sender, from sending: puts it back, since its instant has not come.</summary>
    internal void PutBack() => _ = TryClaim(SlotState.Sending, SlotState.Pending);

    /// <summary>Whoever claimed it from that state ends it; nothing happens if somebody else did.</summary>
    internal bool TryEnd(SlotState from, string output, OutcomeKind kind)
    {
        if (!TryClaim(from, SlotState.Ending)) return false;
        _outcome = MakeOutcome(output, kind, in _decision, in _stages, SentSeconds, in _arrival);
        _state = SlotState.Done;
        return true;
    }

    /// <summary>Decision thread: takes the outcome and frees the slot.</summary>
    internal bool TryTake(out Outcome outcome)
    {
        if (_state != SlotState.Done)
        {
            outcome = default;
            return false;
        }

        outcome = _outcome;
        _state = SlotState.Empty;
        return true;
    }

    internal static Outcome MakeOutcome(
        string output, OutcomeKind kind, in Decision decision, in StageStamps stages, double sentSeconds, in PauseMark arrival)
    {
        var now = PauseMark.Now();
        return new Outcome(
            decision.Number,
            output,
            kind,
            stages with { DueSeconds = decision.DueSeconds, SentSeconds = sentSeconds },
            now.Collections - arrival.Collections,
            now.PauseSeconds - arrival.PauseSeconds);
    }
}
