namespace LiveWave.Dsp;

/// <summary>Second-order notch: takes away one frequency, leaves the rest.</summary>
/// <remarks>
/// w = 2π·centre/rate, β = tan(w/(2·quality)), g = 1/(1 + β); H(z) = g·(1 − 2cos w·z⁻¹ + z⁻²)/(1 − 2g·cos w·z⁻¹ + (2g − 1)·z⁻²)
/// (Orfanidis 1996). −3 dB at centre/quality apart.
/// </remarks>
public static class NotchDesign
{
    /// <summary>Designs a notch.</summary>
    /// <param name="centreHz">What is taken away, above 0, below half the rate.</param>
    /// <param name="quality">Centre over width at −3 dB, above 0. The notch rings for about quality / (π·centre) seconds.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>One section; gain 1 at 0 Hz and at half the rate, 0 at the centre.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range, or the notch as wide as all there is.</exception>
    public static SecondOrderSections Notch(double centreHz, double quality, double rateHz)
    {
        DesignLimits.Frequency(nameof(centreHz), centreHz, rateHz);
        DesignLimits.Quality(quality);
        var radians = 2 * Math.PI * centreHz / rateHz;
        var gain = 1 / (1 + Portable.Tan(radians / (2 * quality)));
        var b1 = -2 * gain * Portable.Cos(radians);
        return new SecondOrderSections(rateHz, new SecondOrderSection(gain, b1, gain, b1, (2 * gain) - 1));
    }
}
