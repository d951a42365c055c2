using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Decisions whose outcomes are still to come.</summary>
/// <remarks>The decision thread's alone. Bounded: the oldest gives way, which can only be one whose outcome was lost.</remarks>
internal sealed class OpenDecisions
{
    private const int Room = 256;
    private readonly Entry[] _entries = new Entry[Room];
    private int _next;

    internal void Add(in Decision decision, int outcomes)
    {
        _entries[_next] = new Entry(decision, outcomes);
        _next = (_next + 1) % Room;
    }

    internal bool TryJoin(in Outcome outcome, out Verdict verdict)
    {
        for (var i = 0; i < Room; i++)
        {
            ref var entry = ref _entries[i];
            if (entry.OutcomesLeft == 0 || entry.Decision.Number != outcome.Decision) continue;
            entry = entry with { OutcomesLeft = entry.OutcomesLeft - 1 };
            verdict = new Verdict(entry.Decision, outcome);
            return true;
        }

        verdict = default;
        return false;
    }

    private readonly record struct Entry(Decision Decision, int OutcomesLeft);
}
