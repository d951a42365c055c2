namespace LiveWave.Dsp;

/// <summary>An ongoing rhythm: one stochastic oscillator a patch times one smooth positive field. It waxes and wanes by itself, has no
/// lag between channels and does not travel.</summary>
/// <param name="FrequencyHz">Centre of its line.</param>
/// <param name="WidthHz">Full width of the line at half its height, above 0.</param>
/// <param name="Microvolts">Standard deviation, root mean square over the patch.</param>
/// <param name="FieldLogSd">Standard deviation of the field's logarithm.</param>
/// <param name="FieldLengthMm">Length of the field's squared-exponential correlation; NaN: 0.6 of the patch's aperture.</param>
public sealed record SceneRhythm(
    double FrequencyHz, double WidthHz, double Microvolts, double FieldLogSd = 0.15, double FieldLengthMm = double.NaN);
