namespace LiveWave.Abstractions;

/// <summary>What a wave estimator says of one frame. NaN stands for 'not known' or 'not defined'.</summary>
public readonly record struct Reading
{
    /// <summary>An invalid reading: nothing known.</summary>
    public Reading()
    {
    }

    /// <summary>The row at which it was made.</summary>
    public RowInstant At { get; init; }

    /// <summary>The patch; set by the host.</summary>
    public string Patch { get; init; } = "";

    /// <summary>The band; set by the host.</summary>
    public string Band { get; init; } = "";

    /// <summary>The wave estimator's name; set by the host.</summary>
    public string Estimator { get; init; } = "";

    /// <summary>False: too few channels observed, or nothing there; the frame can neither start nor hold an event.</summary>
    public bool IsValid { get; init; }

    /// <summary>Share of the good channels whose own sample was used, 0 to 1.</summary>
    public double ObservedShare { get; init; }

    /// <summary>What the frame is.</summary>
    public WaveKind Kind { get; init; } = WaveKind.None;

    /// <summary>What the event machine compares with its thresholds: evidence of the travelling kind that the estimator looks
    /// for, −∞ where a gate is not passed or the frame is invalid.</summary>
    public double Statistic { get; init; } = double.NegativeInfinity;

    /// <summary>Direction of travel, degrees counter-clockwise from +x of the stated view, [0, 360); NaN where undefined.</summary>
    public double DirectionDegrees { get; init; } = double.NaN;

    /// <summary>Cosine of the direction, for averages that need no angle.</summary>
    public double DirectionCosine { get; init; } = double.NaN;

    /// <summary>Sine of the direction.</summary>
    public double DirectionSine { get; init; } = double.NaN;

    /// <summary>Standard error of the direction, degrees.</summary>
    public double DirectionStandardErrorDegrees { get; init; } = double.NaN;

    /// <summary>Wave vector along +x of the stated view, radians per mm; the wave travels along it.</summary>
    public double WaveVectorX { get; init; } = double.NaN;

    /// <summary>Wave vector along +y of the stated view, radians per mm.</summary>
    public double WaveVectorY { get; init; } = double.NaN;

    /// <summary>Variance of <see cref="WaveVectorX"/>, (rad/mm)².</summary>
    public double WaveVectorVarianceX { get; init; } = double.NaN;

    /// <summary>Variance of <see cref="WaveVectorY"/>, (rad/mm)².</summary>
    public double WaveVectorVarianceY { get; init; } = double.NaN;

    /// <summary>Covariance of the two components, (rad/mm)².</summary>
    public double WaveVectorCovariance { get; init; } = double.NaN;

    /// <summary>Wavelength, mm.</summary>
    public double WavelengthMm { get; init; } = double.NaN;

    /// <summary>Lower end of the 90 % interval of the slowness (1/speed), s/m; 0: the speed may be infinite.</summary>
    public double SlownessLow { get; init; } = double.NaN;

    /// <summary>Slowness, s/m; the speed is its inverse.</summary>
    public double SlownessMiddle { get; init; } = double.NaN;

    /// <summary>Upper end of the 90 % interval of the slowness, s/m.</summary>
    public double SlownessHigh { get; init; } = double.NaN;

    /// <summary>Where a wave is not resolved: waves slower than this are excluded (95 %, one-sided), m/s.</summary>
    public double ExcludedBelowMetresPerSecond { get; init; } = double.NaN;

    /// <summary>Centre of a rotating, expanding or contracting wave, mm along +x of the stated view.</summary>
    public double CentreXMm { get; init; } = double.NaN;

    /// <summary>Centre, mm along +y of the stated view.</summary>
    public double CentreYMm { get; init; } = double.NaN;

    /// <summary>Evidence of each kind.</summary>
    public KindEvidence Evidence { get; init; } = new();

    /// <summary>First gate: logarithmic gain of the wave over a uniform field (dL).</summary>
    public double GainOverUniform { get; init; } = double.NaN;

    /// <summary>Second gate: logarithmic gain of an out-of-phase part over any field in phase (Lq).</summary>
    public double GainOutOfPhase { get; init; } = double.NaN;

    /// <summary>|Σz²|/Σ|z|²: 1 for any field in phase or standing, 0 to 1.</summary>
    public double StandingShare { get; init; } = double.NaN;

    /// <summary>Squared resultant of the phases: 1 where all are equal, 0 to 1.</summary>
    public double UniformShare { get; init; } = double.NaN;

    /// <summary>Median over channels of the phase's advance since the last frame, Hz.</summary>
    public double LocalFrequencyHz { get; init; } = double.NaN;

    /// <summary>The wave vector stands at the edge of what this pitch resolves: not to be trusted.</summary>
    public bool IsAtResolutionLimit { get; init; }
}
