using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Keeps the latest pulses with the instant at which each arrived: for tests and demonstrations. In a sheet: <c>memory</c>.</summary>
/// <remarks>Any thread.</remarks>
public sealed class MemoryOutput : IOutput
{
    private readonly IClock _clock;
    private readonly SentPulse[] _kept;
    private readonly Lock _keeping = new();
    private long _sent;
    private bool _isDisposed;

    /// <summary>Makes one.</summary>
    /// <param name="clock">The run's clock.</param>
    /// <param name="keptPulses">How many it keeps, 1 and up; of more, the oldest go. Defaults to 1000.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="keptPulses"/> is below 1.</exception>
    public MemoryOutput(IClock clock, int keptPulses = 1000)
    {
        ArgumentNullException.ThrowIfNull(clock);
        ArgumentOutOfRangeException.ThrowIfLessThan(keptPulses, 1);
        _clock = clock;
        _kept = new SentPulse[keptPulses];
    }

    /// <summary>How many arrived, those that are no longer kept too.</summary>
    public long SentCount
    {
        get
        {
            lock (_keeping) return _sent;
        }
    }

    /// <summary>What is kept, oldest first; a copy.</summary>
    public IReadOnlyList<SentPulse> Kept()
    {
        lock (_keeping)
        {
            var count = (int)Math.Min(_sent, _kept.Length);
            var kept = new SentPulse[count];
            for (var i = 0; i < count; i++) kept[i] = _kept[(_sent - count + i) % _kept.Length];
            return kept;
        }
    }

    /// <inheritdoc/>
    public void Open()
    {
        lock (_keeping) ObjectDisposedException.ThrowIf(_isDisposed, this);
    }

    /// <inheritdoc/>
    /// <exception cref="ObjectDisposedException">It was disposed.</exception>
    public void Send(in Pulse pulse)
    {
        var at = _clock.NowSeconds;
        lock (_keeping)
        {
            ObjectDisposedException.ThrowIf(_isDisposed, this);
            _kept[_sent % _kept.Length] = new SentPulse(pulse, at);
            _sent++;
        }
    }

    /// <inheritdoc/>
    public void Quiet()
    {
        // It is always at rest.
    }

    /// <inheritdoc/>
    /// <remarks>What was kept can still be read.</remarks>
    public void Dispose()
    {
        lock (_keeping) _isDisposed = true;
    }
}
