namespace LiveWave.Dsp;

/// <summary>One section of a cascade: H(z) = (B0 + B1·z⁻¹ + B2·z⁻²) / (1 + A1·z⁻¹ + A2·z⁻²).</summary>
/// <param name="B0">Weight of the present input.</param>
/// <param name="B1">Weight of the input one sample ago.</param>
/// <param name="B2">Weight of the input two samples ago; 0 with <paramref name="A2"/> in a first-order section.</param>
/// <param name="A1">Minus the weight of the output one sample ago.</param>
/// <param name="A2">Minus the weight of the output two samples ago.</param>
public readonly record struct SecondOrderSection(double B0, double B1, double B2, double A1, double A2)
{
    /// <summary>Gain for a constant: (B0 + B1 + B2) / (1 + A1 + A2).</summary>
    public double GainForConstant => (B0 + B1 + B2) / (1 + A1 + A2);

    /// <summary>Both poles lie inside the unit circle (Jury's triangle).</summary>
    public bool IsStable => Math.Abs(A2) < 1 && Math.Abs(A1) < 1 + A2;

    /// <summary>Response at e^jω. Near ω = 0 this form does not cancel: ω² is never got as a difference of numbers near 1.</summary>
    /// <param name="at">The frequency's sines and cosines.</param>
    internal (double Re, double Im) ResponseAt(in UnitCirclePoint at)
    {
        // Both polynomials carry the same factor e^-jω: it drops out of the quotient.
        var (u, v) = at.Centred(B0, B1, B2);
        var (p, q) = at.Centred(1, A1, A2);
        var size = (p * p) + (q * q);
        return (((u * p) + (v * q)) / size, ((v * p) - (u * q)) / size);
    }

    /// <summary>−d arg H / dω in samples, in closed form.</summary>
    /// <param name="at">The frequency's sines and cosines.</param>
    internal double GroupDelaySamples(in UnitCirclePoint at) => at.CentredDelay(B0, B1, B2) - at.CentredDelay(1, A1, A2);
}
