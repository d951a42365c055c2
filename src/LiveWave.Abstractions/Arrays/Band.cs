namespace LiveWave.Abstractions;

/// <summary>A frequency band of interest.</summary>
/// <param name="Name">As the sheet calls it.</param>
/// <param name="LowHz">Lower edge, above 0.</param>
/// <param name="HighHz">Upper edge, above <paramref name="LowHz"/>.</param>
/// <param name="HorizonSamples">The horizons, in rows of the analysis rate, that <see cref="IPhaseEstimator.Predict"/> may be asked for.</param>
public sealed record Band(string Name, double LowHz, double HighHz, IReadOnlyList<int> HorizonSamples)
{
    /// <summary>Middle of the band, Hz.</summary>
    public double CentreHz => 0.5 * (LowHz + HighHz);

    /// <summary>Half the band's width, Hz.</summary>
    public double HalfWidthHz => 0.5 * (HighHz - LowHz);
}
