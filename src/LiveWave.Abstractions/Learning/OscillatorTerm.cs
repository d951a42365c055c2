namespace LiveWave.Abstractions;

/// <summary>One oscillator of a phase model: a complex first-order process.</summary>
/// <param name="PoleRe">Real part of the pole ρ·exp(iω), per sample; |pole| below 1.</param>
/// <param name="PoleIm">Imaginary part of the pole.</param>
/// <param name="DriveVariance">Variance per axis of the noise that drives it, in units of the channel scale squared.</param>
/// <param name="IsTarget">True if it belongs to the rhythm that is read, false for a neighbour or the mains.</param>
public sealed record OscillatorTerm(double PoleRe, double PoleIm, double DriveVariance, bool IsTarget);
