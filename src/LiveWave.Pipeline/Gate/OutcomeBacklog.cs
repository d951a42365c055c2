using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Outcomes that wait for the decision thread to publish them, and their counts. The decision thread's alone, but
/// for the counts, which any thread reads.</summary>
/// <remarks>What a sender ended waits in its slot; here waits what a commit moved out of the slot to use it again, and what
/// a commit ended itself. No more than the commits of one block, so the room below lasts; if it should not, it grows
/// rather than lose an outcome.</remarks>
internal sealed class OutcomeBacklog
{
    private const int UsualRoom = 256;   // more commits than one block of any sensible recording makes

    private readonly Queue<Outcome> _waiting = new(UsualRoom);
    private readonly long[] _counts = new long[Enum.GetValues<OutcomeKind>().Length];

    /// <summary>Most that ever waited.</summary>
    internal int Largest { get; private set; }

    /// <summary>Outcomes of a kind that were taken.</summary>
    internal long Count(OutcomeKind kind) => Volatile.Read(ref _counts[(int)kind]);

    internal void Put(in Outcome outcome)
    {
        _waiting.Enqueue(outcome);
        if (_waiting.Count > Largest) Largest = _waiting.Count;
    }

    internal bool TryTake(OutputLane[] lanes, out Outcome outcome)
    {
        if (!_waiting.TryDequeue(out outcome) && !TryTakeFromSlots(lanes, out outcome)) return false;
        ref var count = ref _counts[(int)outcome.Kind];
        Volatile.Write(ref count, count + 1);
        return true;
    }

    private static bool TryTakeFromSlots(OutputLane[] lanes, out Outcome outcome)
    {
        foreach (var lane in lanes)
        {
            if (lane.TryTake(out outcome)) return true;
        }

        outcome = default;
        return false;
    }
}
