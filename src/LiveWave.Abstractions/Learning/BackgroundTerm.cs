namespace LiveWave.Abstractions;

/// <summary>One first-order process of a phase model's background.</summary>
/// <param name="Pole">Per sample, between 0 and 1.</param>
/// <param name="DriveVariance">Variance of the noise that drives it, in units of the channel scale squared.</param>
public sealed record BackgroundTerm(double Pole, double DriveVariance);
