using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One output's way out: its slot, its sender thread, its health.</summary>
/// <remarks>
/// <para>No send starts after disarming has returned. The sender (1) announces that it is at its last instant, (2) claims
/// the slot by compare-and-swap, (3) reads the gate's standing, (4) sends, (5) takes the announcement back. Disarming
/// (a) swaps the standing, (b) waits until no announcement stands. 1, 2 and a are full fences: if 3 still saw the old
/// standing, it came before a, so the announcement of 1 is seen by b, which waits for 5. If the output keeps the sender
/// longer than its patience, it is declared faulty and closed from outside before b gives up: a closed output sends
/// nothing. What was inside the driver by then can't be recalled.</para>
/// <para>A faulty or ended lane leaves no pulse behind: the flag is set before the slot is looked at, and a commit looks
/// at the flag after it filled the slot, both with full fences, so that one of them ends the pulse.</para>
/// </remarks>
#pragma warning disable CA1001 // the event is left to its finaliser: a commit may still be on its way to it
internal sealed class OutputLane
#pragma warning restore CA1001
{
    // How soon a sender that waits for a far instant notices that its pulse was cancelled and another one is due earlier.
    private const double LongestSleepSeconds = 0.05;

    private readonly PulseSlot _slot = new();
    private readonly GateOutput _output;
    private readonly GateRoom _room;
    private readonly OutputClosing _closing;
    private readonly Func<bool> _isQuiet;
    private readonly AutoResetEvent _wake = new(initialState: false);
    private Thread? _sender;
    private int _senderThreadId;
    private double _enteredSeconds;
    private int _atLastInstant;
    private int _isFaulty;
    private int _isEnding;

    internal OutputLane(GateOutput output, GateRoom room)
    {
        _output = output;
        _room = room;
        _closing = new OutputClosing(output, room.Settling, () => Volatile.Read(ref _atLastInstant) == 0, Fault);
        _isQuiet = () => Volatile.Read(ref _atLastInstant) == 0 || _closing.IsClosed;
    }

    internal string Name => _output.Name;

    internal bool IsDummy => _output.IsDummy;

    internal bool IsOpen { get; private set; }

    internal bool IsFaulty => Volatile.Read(ref _isFaulty) != 0;

    internal SlotState SlotState => _slot.State;

    /// <summary>The sender is not at a last instant, or the output was closed from outside.</summary>
    internal bool IsQuiet => _isQuiet();

    internal double DueSeconds => _slot.DueSeconds;

    internal TimeSpan Patience => _closing.Patience;

    private bool IsEnding => Volatile.Read(ref _isEnding) != 0;

    /// <summary>Host: opens the output.</summary>
    internal void Open()
    {
        _closing.WillNeedQuiet();   // before it opens: one that fails half-way is brought to rest too
        _output.Output.Open();
        IsOpen = true;
    }

    /// <summary>Host: starts the sender thread.</summary>
    internal void Start()
    {
        _sender = new Thread(SendAll) { Name = "livewave:out:" + Name, IsBackground = true };
        _sender.Start();
    }

    /// <summary>Decision thread: puts a pulse or sham into the slot.</summary>
    /// <returns>False if it is not empty; then nothing happened.</returns>
    internal bool TryCommit(in Decision decision, in StageStamps stages, in PauseMark arrival)
    {
        if (!_slot.TryFill(in decision, in stages, _room.Arming.Current, in arrival)) return false;
        if (!TryEndIfOver()) _ = _wake.Set();
        return true;
    }

    /// <summary>Decision thread: takes the outcome and frees the slot.</summary>
    internal bool TryTake(out Outcome outcome) => _slot.TryTake(out outcome);

    /// <summary>The sender's body: waits for the slot's pulse, and asks and sends when its instant has come.</summary>
    /// <returns>False when there was nothing to do.</returns>
    internal bool RunOnce()
    {
        if (_slot.State != SlotState.Pending) return false;
        var wake = Math.Min(_slot.DueSeconds, _room.Clock.NowSeconds + LongestSleepSeconds);
        _room.Clock.WaitUntil(wake);
        var now = _room.Clock.NowSeconds;
        if (now < wake) Cancel();   // the clock was closed: no instant comes
        else if (now >= _slot.DueSeconds) LastInstant();
        return true;
    }

    /// <summary>The sender: claims the pulse, asks the last questions, sends or ends it.</summary>
    internal void LastInstant()
    {
        _senderThreadId = Environment.CurrentManagedThreadId;
        Volatile.Write(ref _enteredSeconds, _room.Clock.NowSeconds);
        _ = Interlocked.Exchange(ref _atLastInstant, 1);
        try
        {
            if (_slot.TryClaim(SlotState.Pending, SlotState.Sending)) AskAndSend();
        }
        finally
        {
            Volatile.Write(ref _atLastInstant, 0);
            _room.Settling.Tell();
        }
    }

    /// <summary>Any thread: ends a pulse that waits.</summary>
    internal void Cancel()
    {
        if (_slot.TryEnd(SlotState.Pending, Name, OutcomeKind.Cancelled)) _room.Settling.Tell();
    }

    /// <summary>Any thread but the decision's, after the standing was swapped: waits until no send is under way, or it has
    /// been closed from outside.</summary>
    internal void AwaitQuiet()
    {
        if (Volatile.Read(ref _senderThreadId) == Environment.CurrentManagedThreadId) return;   // called from inside Send
        if (_room.Settling.Await(_isQuiet, Patience)) return;
        Fault("a pulse stayed inside it for longer than its patience while the run was disarmed");
        _ = _room.Settling.Await(_isQuiet, OutputClosing.Longest(Patience));
    }

    /// <summary>The loop's thread: declares the output faulty if it keeps the sender for longer than its patience.</summary>
    internal void Watch(double nowSeconds)
    {
        if (Volatile.Read(ref _atLastInstant) == 0 || IsFaulty) return;
        if (nowSeconds - Volatile.Read(ref _enteredSeconds) > Patience.TotalSeconds)
            Fault("a pulse stayed inside it for longer than its patience");
    }

    /// <summary>Any thread, after the gate was disarmed for good: nothing is taken any more, the sender leaves.</summary>
    internal void End()
    {
        _ = Interlocked.Exchange(ref _isEnding, 1);
        Cancel();
        _ = _wake.Set();
        _closing.Start(_sender);
    }

    /// <summary>Any thread, after <see cref="End"/>: waits, within bounds, until the output rests and is disposed.</summary>
    internal void AwaitEnd()
    {
        _closing.AwaitClosed();
        _ = _slot.TryEnd(SlotState.Sending, Name, OutcomeKind.RefusedByOutput);   // nothing could free its sender
        _ = _room.Settling.Await(() => _slot.State != SlotState.Ending, Patience);
    }

    // After the slot was made pending, by a full fence: if the lane failed or ended just then, nobody else would end the pulse.
    private bool TryEndIfOver()
    {
        if (!IsEnding && !IsFaulty) return false;
        _ = _slot.TryEnd(SlotState.Pending, Name, IsEnding ? OutcomeKind.Cancelled : OutcomeKind.RefusedByOutput);
        return true;
    }

    private void SendAll()
    {
        try
        {
            while (!IsEnding && !IsFaulty)
            {
                if (!RunOnce()) _ = _wake.WaitOne();
            }
        }
        catch (Exception error)
        {
            Fault("its sender thread failed: " + error.Message);
        }
    }

    private void AskAndSend()
    {
        if (_room.Clock.NowSeconds < _slot.DueSeconds)   // cancelled and filled again while this thread woke up
        {
            _slot.PutBack();
            _ = TryEndIfOver();
            return;
        }

        var kind = Ask();
        var isRehearsed = kind == OutcomeKind.Rehearsed;
        if (kind is OutcomeKind.Sent or OutcomeKind.Withheld || isRehearsed) _slot.SentSeconds = _room.Clock.NowSeconds;
        if (kind == OutcomeKind.Sent || (isRehearsed && _output.IsDummy)) Send(kind);
        else _ = _slot.TryEnd(SlotState.Sending, Name, kind);
    }

    private OutcomeKind Ask()
    {
        if (IsFaulty) return OutcomeKind.RefusedByOutput;
        var committed = _slot.Standing;
        if (committed.State == GateState.Disarmed) return OutcomeKind.NotArmed;   // arming meanwhile doesn't revive it
        if (_room.Arming.Current != committed) return OutcomeKind.Cancelled;
        ref readonly var decision = ref _slot.Decision;
        var answer = committed.Tally.Ask(in decision, _slot.AcquiredSeconds, _room.Clock, out var isUsedUp);
        if (isUsedUp && committed.State == GateState.Armed) _room.Disarm("a limit of the session is reached");
        if (answer != OutcomeKind.Sent) return answer;
        if (decision.Kind != DecisionKind.Pulse) return OutcomeKind.Withheld;
        return committed.State == GateState.Armed ? OutcomeKind.Sent : OutcomeKind.Rehearsed;
    }

    private void Send(OutcomeKind kind)
    {
        ref readonly var decision = ref _slot.Decision;
        var pulse = new Pulse
        {
            Decision = decision.Number,
            DueSeconds = decision.DueSeconds,
            Code = decision.Code,
            Rule = decision.Rule,
            EventNumber = decision.EventNumber,
            PredictedPhaseDegrees = decision.PredictedPhaseDegrees,
            IsRehearsal = kind == OutcomeKind.Rehearsed,
        };
        try
        {
            _output.Output.Send(in pulse);
        }
        catch (Exception error)
        {
            Fault("it refused a pulse: " + error.Message);
            return;
        }

        _ = _slot.TryEnd(SlotState.Sending, Name, kind);   // lost if it was declared faulty meanwhile
        if (_room.Clock.NowSeconds - Volatile.Read(ref _enteredSeconds) > Patience.TotalSeconds)
            Fault("a pulse stayed inside it for longer than its patience");
    }

    private void Fault(string what)
    {
        _room.Notices.Tell(StatusLevel.Fault, Name, what, "the output is closed and the run disarmed: look at the device and begin a new run");
        if (Interlocked.Exchange(ref _isFaulty, 1) != 0) return;
        _room.Disarm($"output '{Name}' failed: {what}");
        if (!_slot.TryEnd(SlotState.Sending, Name, OutcomeKind.RefusedByOutput))
            _ = _slot.TryEnd(SlotState.Pending, Name, OutcomeKind.RefusedByOutput);
        _closing.Start(sender: null);
        _ = _wake.Set();
        _room.Settling.Tell();
    }
}
