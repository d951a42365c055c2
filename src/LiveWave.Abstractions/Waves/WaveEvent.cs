namespace LiveWave.Abstractions;

/// <summary>A wave that lasted, as it stood when it was published: once when it began to pass, once when it was over.</summary>
public readonly record struct WaveEvent
{
    /// <summary>Counted from 1 over the run.</summary>
    public long Number { get; init; }

    /// <summary>The patch.</summary>
    public string Patch { get; init; }

    /// <summary>The band.</summary>
    public string Band { get; init; }

    /// <summary>The wave estimator.</summary>
    public string Estimator { get; init; }

    /// <summary>What it does now.</summary>
    public WaveEventState State { get; init; }

    /// <summary>Its kind when it began to pass.</summary>
    public WaveKind Kind { get; init; }

    /// <summary>The row of its first frame.</summary>
    public RowInstant Onset { get; init; }

    /// <summary>The row at which it began to pass.</summary>
    public RowInstant Passed { get; init; }

    /// <summary>The row of its last frame so far.</summary>
    public RowInstant Last { get; init; }

    /// <summary>Direction of travel when it began to pass: angle of the mean unit vector over the stability window, degrees.</summary>
    public double DirectionDegrees { get; init; }

    /// <summary>Standard error of the direction of the frame at which it began to pass, degrees.</summary>
    public double DirectionStandardErrorDegrees { get; init; }

    /// <summary>Wavelength of that frame, mm.</summary>
    public double WavelengthMm { get; init; }

    /// <summary>Lower end of the 90 % interval of its slowness, s/m; 0: the speed may be infinite; NaN: not known.</summary>
    public double SlownessLow { get; init; }

    /// <summary>Slowness of that frame, s/m.</summary>
    public double SlownessMiddle { get; init; }

    /// <summary>Upper end of the 90 % interval of its slowness, s/m; NaN: not known.</summary>
    public double SlownessHigh { get; init; }

    /// <summary>Local frequency of that frame, Hz.</summary>
    public double FrequencyHz { get; init; }

    /// <summary>Largest evidence so far.</summary>
    public double PeakEvidence { get; init; }

    /// <summary>Frames so far, gaps left out.</summary>
    public int Frames { get; init; }
}
