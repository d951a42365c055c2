namespace LiveWave.Pipeline;

/// <summary>The <c>phase</c> table of a band: how phase is estimated.</summary>
public sealed record PhaseTable
{
    /// <summary>The estimator's plain name.</summary>
    public required string Estimator { get; init; }

    /// <summary>Order of the band-pass filter, 1 to 8; without meaning for other estimators.</summary>
    public required int Order { get; init; }
}
