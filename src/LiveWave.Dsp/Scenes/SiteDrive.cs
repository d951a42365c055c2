namespace LiveWave.Dsp;

/// <summary>One event at the sites of its patch: one oscillator that drives each with an amplitude and a delay of its own.</summary>
internal sealed class SiteDrive
{
    private readonly double[] _amplitudes;
    private readonly double[] _delays;
    private readonly double _duration;
    private readonly double _flank;
    private readonly double _turnRate;
    private readonly double _phase;
    private readonly double _onset;

    /// <param name="truth">The event.</param>
    /// <param name="geometry">Its patch.</param>
    /// <param name="firstChannel">Where the patch begins in a row.</param>
    public SiteDrive(SceneTruth truth, PatchGeometry geometry, int firstChannel)
    {
        FirstChannel = firstChannel;
        (_onset, _duration, _flank) = (truth.OnsetSeconds, truth.Event.DurationSeconds, truth.Event.FlankMs / 1000);
        (_turnRate, _phase) = (2 * Math.PI * truth.FrequencyHz, truth.PhaseRadians);
        _delays = SitePattern.DelaysSeconds(truth, geometry);
        _amplitudes = SitePattern.Amplitudes(truth, geometry);
        for (var i = 0; i < _amplitudes.Length; i++) _amplitudes[i] *= truth.AmplitudeMicrovolts;
        StartSeconds = _onset + _delays.Min();
        EndSeconds = _onset + _duration + _delays.Max();
    }

    /// <summary>Where the patch begins in a row.</summary>
    public int FirstChannel { get; }

    /// <summary>Nothing before.</summary>
    public double StartSeconds { get; }

    /// <summary>Nothing after.</summary>
    public double EndSeconds { get; }

    /// <summary>Adds the event to a row. Does not allocate.</summary>
    /// <param name="seconds">The row's instant.</param>
    /// <param name="row">All channels of the stream.</param>
    public void Add(double seconds, Span<double> row)
    {
        if (seconds < StartSeconds || seconds > EndSeconds) return;
        for (var i = 0; i < _delays.Length; i++)
        {
            var since = seconds - _onset - _delays[i];
            var edge = Math.Min(since, _duration - since);
            if (edge < 0) continue;
            var height = edge >= _flank ? 1 : 0.5 - (0.5 * Portable.Cos(Math.PI * edge / _flank));
            row[FirstChannel + i] += _amplitudes[i] * height * Portable.Cos((_turnRate * since) + _phase);
        }
    }
}
