namespace LiveWave.Pipeline;

/// <summary>A <c>[[band.wave]]</c> table: one wave estimator.</summary>
public sealed record WaveTable
{
    /// <summary>The estimator's plain name.</summary>
    public required string Estimator { get; init; }

    /// <summary>From reading to reading, ms, above 0.</summary>
    public required double EveryMs { get; init; }

    /// <summary>Smallest logarithmic gain of the wave over a uniform field at which a frame counts.</summary>
    public required double GainOverUniform { get; init; }

    /// <summary>Smallest logarithmic gain of its out-of-phase part over any field in phase at which a frame counts.</summary>
    public required double GainOutOfPhase { get; init; }

    /// <summary>Shortest wavelength looked for, mm; NaN: the larger of 2.5 pitches and half the aperture.</summary>
    public required double ShortestWavelengthMm { get; init; }

    /// <summary>Slowest wave of interest, m/s; NaN: not stated, and then no frame is called synchronous.</summary>
    public required double SlowestWaveMetresPerSecond { get; init; }

    /// <summary>When a wave is an event.</summary>
    public required EventTable Event { get; init; }
}
