using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

/// <summary>The gate said again in the plainest way: one thread, whole units of time, lists that only grow. Two outputs.</summary>
internal sealed class GateModel(bool mayBeArmed, bool isDummy, int latenessUnits, int minuteUnits, int? perMinute, int? perSession, int? shortestUnits)
{
    private readonly Waiting?[] _slots = new Waiting?[2];
    private readonly bool[] _isFaulty = new bool[2];
    private readonly List<Leave> _sessionLeaves = [];
    private List<Leave> _leaves = [];
    private int _standing;   // counts every change of what is let through

    public GateState State { get; private set; } = mayBeArmed ? GateState.Disarmed : GateState.Rehearsing;

    public int Now { get; private set; }

    public int Used => _leaves.Count;

    public SortedDictionary<(long Decision, int Output), OutcomeKind> Ended { get; } = [];

    /// <summary>Decisions that the output was asked to send.</summary>
    public List<(long Decision, int Output)> Asked { get; } = [];

    public bool Throws { get; set; }

    public void Move(int units) => Now += units;

    public void Commit(long decision, bool isSham, int due, int output)
    {
        if (_slots[output] is not null) Ended.Add((decision, output), OutcomeKind.OutputBusy);
        else if (_isFaulty[output]) Ended.Add((decision, output), OutcomeKind.RefusedByOutput);
        else _slots[output] = new Waiting(decision, isSham, due, State, _standing);
    }

    public void Step(int output)
    {
        if (_slots[output] is not { } pulse || pulse.Due > Now) return;
        _slots[output] = null;
        var kind = Answer(pulse);
        if (kind == OutcomeKind.Sent || (kind == OutcomeKind.Rehearsed && isDummy))
        {
            Asked.Add((pulse.Decision, output));
            if (Throws)
            {
                kind = OutcomeKind.RefusedByOutput;
                _isFaulty[output] = true;
                Disarm();
            }
        }

        Ended.Add((pulse.Decision, output), kind);
    }

    public bool Arm()
    {
        if (!mayBeArmed || _isFaulty.Contains(true)) return false;
        if (State != GateState.Armed) Stand(GateState.Armed);
        _leaves = _sessionLeaves;
        return true;
    }

    public bool Rehearse()
    {
        if (_isFaulty.Contains(true)) return false;
        if (State == GateState.Rehearsing) return true;
        Stand(GateState.Rehearsing);
        if (mayBeArmed) _leaves = [];
        CancelAll();
        return true;
    }

    public void Disarm()
    {
        Stand(GateState.Disarmed);
        CancelAll();
    }

    private OutcomeKind Answer(Waiting pulse)
    {
        if (pulse.State == GateState.Disarmed) return OutcomeKind.NotArmed;
        if (pulse.Standing != _standing) return OutcomeKind.Cancelled;
        if (Now - pulse.Due > latenessUnits) return OutcomeKind.Late;
        if (_leaves.All(leave => leave.Decision != pulse.Decision))
        {
            if (_leaves.Count >= perSession)
            {
                if (State == GateState.Armed) Disarm();
                return OutcomeKind.OverLimit;
            }

            if (_leaves.Count(leave => pulse.Due - leave.Due < minuteUnits || Now - leave.At < minuteUnits) >= perMinute) return OutcomeKind.OverLimit;
            if (_leaves.Count > 0 && (pulse.Due - _leaves[^1].Due < shortestUnits || Now - _leaves[^1].At < shortestUnits)) return OutcomeKind.OverLimit;
            if (!pulse.IsSham) _leaves.Add(new Leave(pulse.Decision, pulse.Due, Now));
        }

        if (pulse.IsSham) return OutcomeKind.Withheld;
        return State == GateState.Armed ? OutcomeKind.Sent : OutcomeKind.Rehearsed;
    }

    private void Stand(GateState state)
    {
        State = state;
        _standing++;
    }

    private void CancelAll()
    {
        for (var output = 0; output < _slots.Length; output++)
        {
            if (_slots[output] is { } pulse) Ended.Add((pulse.Decision, output), OutcomeKind.Cancelled);
            _slots[output] = null;
        }
    }

    private sealed record Waiting(long Decision, bool IsSham, int Due, GateState State, int Standing);

    private sealed record Leave(long Decision, int Due, int At);
}
