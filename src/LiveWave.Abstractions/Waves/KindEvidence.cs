namespace LiveWave.Abstractions;

/// <summary>Logarithmic evidence of each kind against noise; NaN for a kind the estimator does not look for.</summary>
public readonly record struct KindEvidence
{
    /// <summary>None was looked for.</summary>
    public KindEvidence()
    {
    }

    /// <summary>Planar.</summary>
    public double Planar { get; init; } = double.NaN;

    /// <summary>Rotating counter-clockwise.</summary>
    public double RotatingCounterClockwise { get; init; } = double.NaN;

    /// <summary>Rotating clockwise.</summary>
    public double RotatingClockwise { get; init; } = double.NaN;

    /// <summary>Expanding.</summary>
    public double Expanding { get; init; } = double.NaN;

    /// <summary>Contracting.</summary>
    public double Contracting { get; init; } = double.NaN;

    /// <summary>Front.</summary>
    public double Front { get; init; } = double.NaN;

    /// <summary>The same phase everywhere.</summary>
    public double Synchronous { get; init; } = double.NaN;
}
