namespace LiveWave.Abstractions;

/// <summary>Oscillators over a background and white noise: one model for all channels of a patch, in one band.</summary>
/// <remarks>State-space oscillators after Matsuda and Komaki (2017). Filters that differ between channels turn true waves,
/// hence one model a patch.</remarks>
/// <param name="RateHz">Rate at which the poles hold.</param>
/// <param name="Oscillators">At least one target.</param>
/// <param name="Background">May be empty.</param>
/// <param name="WhiteVariance">Variance of the white noise, above 0, in units of the channel scale squared.</param>
public sealed record PhaseModel(
    double RateHz, IReadOnlyList<OscillatorTerm> Oscillators, IReadOnlyList<BackgroundTerm> Background, double WhiteVariance);
