using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The one place that knows armed state, limits and lateness, and lets a pulse out or not.</summary>
/// <remarks>
/// <para>Decision thread: <see cref="Commit(in Decision, in StageStamps, int)"/>, <see cref="TryTake"/>,
/// <see cref="TryTakeNotice"/>, <see cref="Watch"/>, <see cref="NextDueSeconds"/>, <see cref="AwaitSettled"/>. All but the last
/// never block, and neither lock nor allocate as long as no output fails. Any thread: everything else.</para>
/// <para>Each output has a slot for one pulse and a sender thread. Outcomes never flow back to decisions. Nothing is sent on
/// start, stop or failure. A gate that may not be armed rehearses, and opens only outputs marked as dummies.</para>
/// </remarks>
public sealed class PulseGate : IDisposable
{
    private readonly OutputLane[] _lanes;
    private readonly GateRoom _room;
    private readonly GateLimits? _limits;
    private readonly bool _mayBeArmed;
    private readonly double _allowedLatenessSeconds;
    private readonly PulseTally _sessionTally;
    private readonly Func<bool> _isSettled;
    private readonly OutcomeBacklog _outcomes = new();
    private PauseMark _arrival = PauseMark.Now();
    private int _isOpened;
    private int _isEnded;

    /// <summary>Makes a gate, disarmed; it touches no output yet.</summary>
    /// <param name="outputs">The outputs, in the order in which rules number them.</param>
    /// <param name="clock">The run's clock.</param>
    /// <param name="limits">The sheet's limits; null if it gives none, and then it can't be armed.</param>
    /// <param name="mayBeArmed">Whether the run may be armed at all; otherwise it only rehearses.</param>
    /// <param name="allowedLatenessMs">How long after its due instant a pulse may still be sent, ms, 0 to 1000. Defaults to 1:
    /// 7° of phase at 20 Hz, and what a sleeping thread needs to wake up on a busy machine without real-time priority.</param>
    /// <exception cref="ArgumentException">Two outputs have one name, or patience, lateness or a limit is out of range.</exception>
    public PulseGate(
        IReadOnlyList<GateOutput> outputs, IClock clock, GateLimits? limits = null, bool mayBeArmed = false, double allowedLatenessMs = 1)
    {
        ArgumentNullException.ThrowIfNull(outputs);
        ArgumentNullException.ThrowIfNull(clock);
        if (!(allowedLatenessMs is >= 0 and <= 1000))
            throw new ArgumentOutOfRangeException(nameof(allowedLatenessMs), allowedLatenessMs, "allowed lateness is 0 to 1000 ms");
        limits?.RefuseNonsense();
        RefuseNonsense(outputs);
        _limits = limits;
        _mayBeArmed = mayBeArmed;
        _allowedLatenessSeconds = allowedLatenessMs / 1000;
        _sessionTally = NewTally(clock);
        _room = new GateRoom(new GateArming(_sessionTally), clock, new Settling(), new GateNotices(clock), DisarmWithoutWaiting);
        _lanes = [.. outputs.Select(output => new OutputLane(output, _room))];
        _isSettled = IsSettled;
    }

    /// <summary>What is let through, now.</summary>
    public GateState State => _room.Arming.Current.State;

    /// <summary>Why it is disarmed: the first reason since it last stood otherwise. Empty before the first.</summary>
    public string DisarmReason => _room.Arming.Current.Reason;

    /// <summary>Pulses that count against the limits: those of the session, or of the rehearsal while a run rehearses that may be armed.</summary>
    public int PulsesUsed => _room.Arming.Current.Tally.Used;

    /// <summary>Pulses that the session may use; null: not limited.</summary>
    public int? PulsesAllowed => _limits?.PulsesPerSession;

    /// <summary>Number of outputs.</summary>
    public int OutputCount => _lanes.Length;

    /// <summary>News that were too many to keep for <see cref="TryTakeNotice"/>.</summary>
    public int NoticesDropped => _room.Notices.Dropped;

    /// <summary>Most outcomes that ever waited to be taken; decision thread.</summary>
    public int LargestBacklog => _outcomes.Largest;

    /// <summary>When the earliest pending pulse is due, seconds of the run's clock; positive infinity if none is. Decision thread.</summary>
    public double NextDueSeconds
    {
        get
        {
            var next = double.PositiveInfinity;
            foreach (var lane in _lanes)
            {
                if (lane.SlotState == SlotState.Pending && lane.DueSeconds < next) next = lane.DueSeconds;
            }

            return next;
        }
    }

    /// <summary>Outcomes of a kind that were taken so far.</summary>
    /// <param name="kind">The kind.</param>
    public long Count(OutcomeKind kind) => _outcomes.Count(kind);

    /// <summary>Opens the outputs and starts their sender threads. A run that can't be armed rehearses from here on, and opens
    /// only its dummies.</summary>
    /// <exception cref="RefusedException">An output can't be opened; dispose the gate.</exception>
    /// <exception cref="InvalidOperationException">It was opened before.</exception>
    public void Open()
    {
        OpenOutputs();
        foreach (var lane in _lanes) lane.Start();
    }

    /// <summary>Commits a pulse or sham to one output. It ends in exactly one outcome, for <see cref="TryTake"/>.</summary>
    /// <param name="decision">A pulse or sham.</param>
    /// <param name="stages">Its stages so far; due is taken from the decision.</param>
    /// <param name="output">The output's number, from 0.</param>
    /// <exception cref="ArgumentException">The decision is a hold.</exception>
    public void Commit(in Decision decision, in StageStamps stages, int output)
    {
        if (decision.Kind is not (DecisionKind.Pulse or DecisionKind.Sham))
            throw new ArgumentException("a hold is not committed", nameof(decision));
        var lane = _lanes[output];
        if (lane.TryTake(out var earlier)) _outcomes.Put(in earlier);   // the slot is free again, in the same turn
        if (!double.IsFinite(decision.DueSeconds)) EndAtOnce(in decision, in stages, lane, OutcomeKind.Late);
        else if (!lane.TryCommit(in decision, in stages, in _arrival))
            EndAtOnce(in decision, in stages, lane, lane.IsFaulty ? OutcomeKind.RefusedByOutput : OutcomeKind.OutputBusy);
    }

    /// <summary>Commits a pulse or sham to all outputs of its rule; against the limits it counts once.</summary>
    /// <param name="decision">A pulse or sham.</param>
    /// <param name="stages">Its stages so far.</param>
    /// <param name="outputs">The outputs' numbers.</param>
    /// <exception cref="ArgumentException">The decision is a hold.</exception>
    public void Commit(in Decision decision, in StageStamps stages, ReadOnlySpan<int> outputs)
    {
        foreach (var output in outputs) Commit(in decision, in stages, output);
    }

    /// <summary>Takes an outcome, if there is one.</summary>
    /// <param name="outcome">The outcome.</param>
    /// <returns>Whether there was one.</returns>
    public bool TryTake(out Outcome outcome) => _outcomes.TryTake(_lanes, out outcome);

    /// <summary>Takes something that people should know, if there is: faults, and why it was disarmed.</summary>
    /// <param name="status">What to know.</param>
    /// <returns>Whether there was something.</returns>
    public bool TryTakeNotice(out Status status) => _room.Notices.TryTake(out status);

    /// <summary>Each turn, right after the pull: declares outputs faulty that keep a pulse longer than their patience, and
    /// notes how much garbage collection there has been before the rows that just arrived.</summary>
    /// <param name="nowSeconds">Now, the run's clock.</param>
    public void Watch(double nowSeconds)
    {
        _arrival = PauseMark.Now();
        foreach (var lane in _lanes) lane.Watch(nowSeconds);
    }

    /// <summary>For runs on a virtual clock: blocks until no pulse that is due by now waits or is being sent.</summary>
    /// <param name="atMost">How long to wait in real time.</param>
    /// <returns>Whether it settled.</returns>
    public bool AwaitSettled(TimeSpan atMost) => _room.Settling.Await(_isSettled, atMost);

    /// <summary>Arms. Whoever calls has seen to the phrase, the calibration and the self-test.</summary>
    /// <exception cref="RefusedException">The run may only rehearse, has no limits, a faulty output or an output that is not
    /// open, is at its end, or was disarmed at the same time.</exception>
    public void Arm()
    {
        var examined = _room.Arming.Current;
        if (!_mayBeArmed) throw Refusal("this run can only rehearse", "'livewave run' on a live stream can be armed");
        if (_limits is null) throw Refusal("the sheet gives no limits", "give it a [limits] table");
        RefuseUnfit();
        if (examined.State == GateState.Armed) return;
        Change(examined, new GateStanding(GateState.Armed, "", _sessionTally));
    }

    /// <summary>Rehearses from now on; from armed too. Pulses of a rehearsal don't use up those of the session.</summary>
    /// <exception cref="RefusedException">An output is faulty or not open, the run is at its end, or it was disarmed at the same time.</exception>
    public void Rehearse()
    {
        var examined = _room.Arming.Current;
        RefuseUnfit();
        if (examined.State == GateState.Rehearsing) return;
        Change(examined, new GateStanding(GateState.Rehearsing, "", _mayBeArmed ? NewTally(_room.Clock) : _sessionTally));
        CancelPending();
        AwaitQuiet();
    }

    /// <summary>Disarms: after it has returned no send starts, and what waited is cancelled. A send that is already inside a
    /// driver can't be recalled.</summary>
    /// <param name="reason">Why; the first reason is kept.</param>
    /// <remarks>Any thread but the decision's. It takes effect at once, and returns when sends under way have ended: at once in
    /// general; after an output's patience that output is declared faulty and closed from outside, which takes its patience
    /// for quiet and for dispose at most.</remarks>
    public void Disarm(string reason)
    {
        DisarmWithoutWaiting(reason);
        AwaitQuiet();
    }

    /// <summary>Disarms, for the decision thread and for senders: never blocks. A send whose last questions were answered just
    /// before may still start; nothing later does.</summary>
    /// <param name="reason">Why; the first reason is kept.</param>
    public void DisarmWithoutWaiting(string reason)
    {
        var before = DisarmQuietly(reason);
        if (before != GateState.Disarmed)
            _room.Notices.Tell(StatusLevel.Warning, "gate", "disarmed: " + reason, before == GateState.Armed ? "arm again when the cause is gone" : "");
    }

    /// <summary>Ends the run: disarms for good, cancels what waits, brings every opened output to rest, lets senders leave, disposes
    /// the outputs. Bounded by the outputs' patience. Close a virtual clock before.</summary>
    /// <param name="reason">Why the run ended.</param>
    /// <remarks>Any thread, any number of times; every caller returns when it is over.</remarks>
    public void End(string reason)
    {
        _ = Interlocked.Exchange(ref _isEnded, 1);
        if (DisarmQuietly(reason) != GateState.Disarmed) _room.Notices.Tell(StatusLevel.Note, "gate", "disarmed: " + reason, "");
        foreach (var lane in _lanes) lane.End();
        foreach (var lane in _lanes) lane.AwaitEnd();
    }

    /// <summary>Ends the run, if it has not been ended. Outcomes can still be taken.</summary>
    public void Dispose() => End("the run ended");

    /// <summary>Tests: opens without threads; <see cref="Lane"/> steps them.</summary>
    internal void OpenOutputs()
    {
        if (Interlocked.Exchange(ref _isOpened, 1) != 0) throw new InvalidOperationException("the gate was opened before");
        foreach (var lane in _lanes)
        {
            if (_mayBeArmed || lane.IsDummy) lane.Open();
        }

        if (!_mayBeArmed) Rehearse();
    }

    /// <summary>Tests: one output's lane.</summary>
    internal OutputLane Lane(int output) => _lanes[output];

    private static RefusedException Refusal(string what, string advice) => new(what, "gate", advice);

    private static void RefuseNonsense(IReadOnlyList<GateOutput> outputs)
    {
        var names = new HashSet<string>(StringComparer.Ordinal);
        foreach (var output in outputs)
        {
            if (!names.Add(output.Name)) throw new ArgumentException($"two outputs are called '{output.Name}'", nameof(outputs));
            if (!(output.PatienceMs is > 0 and <= 60_000))
                throw new ArgumentOutOfRangeException(nameof(outputs), output.PatienceMs, "patience is above 0 to 60000 ms");
        }
    }

    private PulseTally NewTally(IClock clock) => new(_limits, _allowedLatenessSeconds, clock.NowSeconds);

    private void RefuseUnfit()
    {
        if (Volatile.Read(ref _isOpened) == 0) throw Refusal("the outputs are not open", "open the gate first");
        if (Volatile.Read(ref _isEnded) != 0) throw Refusal("the run is at its end", "begin a new run");
        foreach (var lane in _lanes)
        {
            if (lane.IsFaulty) throw Refusal($"output '{lane.Name}' is faulty", "look at the device and begin a new run");
            if (_mayBeArmed && !lane.IsOpen) throw Refusal($"output '{lane.Name}' is not open", "begin a new run");
        }
    }

    private void Change(GateStanding examined, GateStanding next)
    {
        // Whatever was examined may have changed meanwhile: a fault and the end disarm after they are said, so that the
        // standing is no longer the one examined.
        if (!_room.Arming.TryChange(examined, next))
            throw Refusal("it was disarmed at the same time", "look at the reason and try again");
    }

    private GateState DisarmQuietly(string reason)
    {
        ArgumentException.ThrowIfNullOrEmpty(reason);
        var before = _room.Arming.Disarm(reason);
        CancelPending();
        return before.State;
    }

    private void CancelPending()
    {
        foreach (var lane in _lanes) lane.Cancel();
    }

    private void AwaitQuiet()
    {
        foreach (var lane in _lanes) lane.AwaitQuiet();
    }

    private bool IsSettled()
    {
        var now = _room.Clock.NowSeconds;
        foreach (var lane in _lanes)
        {
            var state = lane.SlotState;
            if (state is SlotState.Sending or SlotState.Ending || (state == SlotState.Pending && lane.DueSeconds <= now)) return false;
            if (!lane.IsQuiet) return false;   // its patience would be measured on a clock that jumps
        }

        return true;
    }

    private void EndAtOnce(in Decision decision, in StageStamps stages, OutputLane lane, OutcomeKind kind)
    {
        var outcome = PulseSlot.MakeOutcome(lane.Name, kind, in decision, in stages, double.NaN, in _arrival);
        _outcomes.Put(in outcome);
    }
}
