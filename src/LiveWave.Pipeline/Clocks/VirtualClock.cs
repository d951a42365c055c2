using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A clock that stands still until it is moved: for tests, and for runs as fast as possible.</summary>
/// <remarks>Any thread. Reading takes no lock and does not allocate; one thread at a time should move it.</remarks>
public sealed class VirtualClock : IClock
{
    private readonly object _moving = new();   // guards moves and waits; readers read without it
    private double _nowSeconds;
    private bool _isClosed;

    /// <summary>Makes a clock that stands at an instant.</summary>
    /// <param name="nowSeconds">The instant, seconds; finite.</param>
    /// <exception cref="ArgumentOutOfRangeException">It is not finite.</exception>
    public VirtualClock(double nowSeconds = 0)
    {
        RefuseNotFinite(nowSeconds, nameof(nowSeconds));
        _nowSeconds = nowSeconds;
    }

    /// <inheritdoc/>
    public double NowSeconds => Volatile.Read(ref _nowSeconds);

    /// <summary>Moves the clock and frees whoever waits for an instant up to there. Never goes back: an earlier instant
    /// changes nothing.</summary>
    /// <param name="instantSeconds">Where to, seconds; finite.</param>
    /// <exception cref="ArgumentOutOfRangeException">It is not finite.</exception>
    public void MoveTo(double instantSeconds)
    {
        RefuseNotFinite(instantSeconds, nameof(instantSeconds));
        lock (_moving)
        {
            if (instantSeconds <= _nowSeconds) return;
            Volatile.Write(ref _nowSeconds, instantSeconds);
            Monitor.PulseAll(_moving);
        }
    }

    /// <inheritdoc/>
    /// <remarks>Blocks until the clock is moved there. Only a closed clock returns before the instant: whoever waits for
    /// something that must not happen early looks at <see cref="NowSeconds"/> afterwards.</remarks>
    public void WaitUntil(double instantSeconds)
    {
        lock (_moving)
        {
            while (!_isClosed && _nowSeconds < instantSeconds) _ = Monitor.Wait(_moving);
        }
    }

    /// <summary>Frees all who wait, now and later: nobody will move the clock any more.</summary>
    public void Close()
    {
        lock (_moving)
        {
            _isClosed = true;
            Monitor.PulseAll(_moving);
        }
    }

    private static void RefuseNotFinite(double instantSeconds, string name)
    {
        if (!double.IsFinite(instantSeconds))
            throw new ArgumentOutOfRangeException(name, instantSeconds, "a clock stands at a finite time");
    }
}
