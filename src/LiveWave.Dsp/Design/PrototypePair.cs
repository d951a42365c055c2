namespace LiveWave.Dsp;

/// <summary>
/// Two conjugate poles of an analog low-pass of edge 1, with the two zeros that belong to them:
/// m·(1 + u·s²)/(s² + 2σs + m), gain 1 for a constant; σ = <paramref name="Damping"/>, m = |pole|².
/// </summary>
/// <param name="Damping">σ, minus the poles' real part, above 0.</param>
/// <param name="Frequency">Their imaginary part, above 0.</param>
/// <param name="ZeroInverseSquare">u: the zeros lie at ±j/√u; 0: at infinity.</param>
internal readonly record struct PrototypePair(double Damping, double Frequency, double ZeroInverseSquare)
{
    /// <summary>m, the poles' distance from 0, squared.</summary>
    public double Square => (Damping * Damping) + (Frequency * Frequency);
}
