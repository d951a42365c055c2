namespace LiveWave.Dsp;

/// <summary>gain · (s² + z)/(s² + 2σs + m), or with another numerator: an analog section on its way to a digital one.</summary>
/// <param name="N2">Weight of s² in the numerator.</param>
/// <param name="N1">Weight of s.</param>
/// <param name="N0">Constant.</param>
/// <param name="Sigma">σ, above 0.</param>
/// <param name="Square">m, above 0.</param>
internal readonly record struct AnalogSection(double N2, double N1, double N0, double Sigma, double Square)
{
    /// <summary>The same section times a gain.</summary>
    public AnalogSection Times(double gain) => this with { N2 = gain * N2, N1 = gain * N1, N0 = gain * N0 };

    /// <summary>Size of the gain at s = j√(square).</summary>
    public double GainAt(double frequencySquare) =>
        Portable.Hypot(N0 - (N2 * frequencySquare), N1 * Math.Sqrt(frequencySquare))
        / Portable.Hypot(Square - frequencySquare, 2 * Sigma * Math.Sqrt(frequencySquare));

    /// <summary>The digital section, by s = (1 − z⁻¹)/(1 + z⁻¹).</summary>
    public SecondOrderSection Digital()
    {
        var a0 = 1 + (2 * Sigma) + Square;
        return new SecondOrderSection(
            (N2 + N1 + N0) / a0, 2 * (N0 - N2) / a0, (N2 - N1 + N0) / a0, 2 * (Square - 1) / a0, (1 - (2 * Sigma) + Square) / a0);
    }
}
