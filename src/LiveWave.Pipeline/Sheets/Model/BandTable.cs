namespace LiveWave.Pipeline;

/// <summary>A <c>[[band]]</c> table: a frequency band with its phase estimator and its wave estimators.</summary>
public sealed record BandTable
{
    /// <summary>How the band is called.</summary>
    public required string Name { get; init; }

    /// <summary>Lower edge, Hz, above 0.</summary>
    public required double LowHz { get; init; }

    /// <summary>Upper edge, Hz, above <see cref="LowHz"/> and below half the rate.</summary>
    public required double HighHz { get; init; }

    /// <summary>How phase is estimated.</summary>
    public required PhaseTable Phase { get; init; }

    /// <summary>Wave estimators, at least one, each named once.</summary>
    public required IReadOnlyList<WaveTable> Waves { get; init; }
}
