using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Decisions whose outcomes are still to come.</summary>
/// <remarks>The decision thread's alone. A ring with more room than the decisions of any sensible block; where a block holds more
/// (a whole recording in one), it grows rather than lose an outcome.</remarks>
internal sealed class OpenDecisions
{
    private const int UsualRoom = 256;
    private Entry[] _entries = new Entry[UsualRoom];
    private int _next;

    internal void Add(in Decision decision, int outcomes)
    {
        if (_entries[_next].OutcomesLeft > 0) Grow();
        _entries[_next] = new Entry(decision, outcomes);
        _next = (_next + 1) % _entries.Length;
    }

    internal bool TryJoin(in Outcome outcome, out Verdict verdict)
    {
        for (var i = 0; i < _entries.Length; i++)
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

    private void Grow()
    {
        _next = _entries.Length;
        Array.Resize(ref _entries, 2 * _entries.Length);
    }

    private readonly record struct Entry(Decision Decision, int OutcomesLeft);
}
