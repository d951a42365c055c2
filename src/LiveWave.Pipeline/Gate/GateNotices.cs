using System.Collections.Concurrent;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What the gate has to say to people: told from any thread, taken by the decision thread, which publishes it.</summary>
/// <remarks>Bounded: beyond that, news are counted and not kept, since the first ones tell the cause. Taking from it while it
/// is empty neither locks nor allocates.</remarks>
internal sealed class GateNotices(IClock clock)
{
    private const int MostKept = 256;

    private readonly ConcurrentQueue<Status> _kept = new();
    private int _dropped;

    /// <summary>News that were not kept.</summary>
    internal int Dropped => Volatile.Read(ref _dropped);

    internal void Tell(StatusLevel level, string where, string what, string advice)
    {
        if (_kept.Count >= MostKept) _ = Interlocked.Increment(ref _dropped);
        else _kept.Enqueue(new Status(level, where, what, advice, clock.NowSeconds));
    }

    internal bool TryTake(out Status status) => _kept.TryDequeue(out status);
}
