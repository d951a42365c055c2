using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Delivers a recording at the pace at which it was made: a block arrives when its last row's stamp has come.</summary>
/// <param name="inner">The recording.</param>
/// <param name="clock">A clock in the recording's own stamps.</param>
public sealed class PacedFeed(IFeed inner, IClock clock) : IFeed
{
    private bool _isLoaded;
    private double _dueSeconds;

    /// <inheritdoc/>
    public StreamFormat Format => inner.Format;

    /// <inheritdoc/>
    /// <remarks>A block that is not due yet stays in <paramref name="into"/>: hand in the same one again.</remarks>
    public PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        if (!_isLoaded)
        {
            var result = inner.Pull(into, atMost);
            if (result != PullResult.Samples) return result;
            _isLoaded = true;
            _dueSeconds = into.RawStampSeconds(into.Count - 1);
        }

        var until = clock.NowSeconds + atMost.TotalSeconds;
        if (_dueSeconds > until)
        {
            clock.WaitUntil(until);
            return PullResult.Nothing;
        }

        clock.WaitUntil(_dueSeconds);
        _isLoaded = false;
        return PullResult.Samples;
    }

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();
}
