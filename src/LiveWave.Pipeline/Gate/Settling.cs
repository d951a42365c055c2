namespace LiveWave.Pipeline;

/// <summary>Lets an operator's thread, or the host of a run as fast as possible, wait until senders have come to a point.
/// Senders tell here only after they are through; bounded in real time, since a virtual clock may stand still for ever.</summary>
internal sealed class Settling
{
    private readonly object _told = new();
    private readonly RealClock _clock = new();

    /// <summary>A sender or closer: something a waiter may look at has changed.</summary>
    internal void Tell()
    {
        lock (_told) Monitor.PulseAll(_told);
    }

    /// <summary>Waits until a condition holds, or time is up.</summary>
    /// <param name="holds">The condition; changed before <see cref="Tell"/> is called, so no change is missed.</param>
    /// <param name="atMost">How long to wait in real time.</param>
    /// <returns>Whether it holds.</returns>
    internal bool Await(Func<bool> holds, TimeSpan atMost)
    {
        if (holds()) return true;
        var until = _clock.NowSeconds + atMost.TotalSeconds;
        lock (_told)
        {
            while (!holds())
            {
                var leftMs = (until - _clock.NowSeconds) * 1000;
                if (!(leftMs > 0)) return false;
                _ = Monitor.Wait(_told, (int)Math.Min(leftMs + 1, 60_000));
            }
        }

        return true;
    }
}
