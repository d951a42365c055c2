namespace LiveWave.Dsp;

/// <summary>
/// Butterworth (1930) filters: as flat as can be in the band, −3 dB at the edges. Designed from the analog poles by the bilinear
/// transform, edges pre-warped, so that the digital edges are exact.
/// </summary>
/// <remarks>
/// s = (1 − z⁻¹)/(1 + z⁻¹); an edge f lies at W = tan(π·f/rate). Every pair of poles is mapped as the quadratic it belongs to,
/// s² + 2σs + m, so no product of roots is rounded and each section has the gain of its own analog part: pass gain near 1,
/// no section far above or below. Sections run from the most to the least damped.
/// </remarks>
public static class ButterworthDesign
{
    /// <summary>Lets through what lies below an edge.</summary>
    /// <param name="order">1 to 16: falls by 6·order dB an octave.</param>
    /// <param name="cutoffHz">Edge (−3 dB), above 0, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>(order + 1) / 2 sections, gain 1 at 0 Hz.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections LowPass(int order, double cutoffHz, double rateHz) =>
        OneEdge(order, cutoffHz, rateHz, isHighPass: false);

    /// <summary>Lets through what lies above an edge; takes offsets away completely.</summary>
    /// <param name="order">1 to 16: falls by 6·order dB an octave.</param>
    /// <param name="cutoffHz">Edge (−3 dB), above 0, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>(order + 1) / 2 sections, gain 1 at half the rate.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections HighPass(int order, double cutoffHz, double rateHz) =>
        OneEdge(order, cutoffHz, rateHz, isHighPass: true);

    /// <summary>Lets through what lies between two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="lowHz">Lower edge (−3 dB), above 0.</param>
    /// <param name="highHz">Upper edge (−3 dB), above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections, gain 1 at the band's (warped geometric) centre.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandPass(int order, double lowHz, double highHz, double rateHz)
    {
        DesignLimits.Order(order);
        DesignLimits.Edges(lowHz, highHz, rateHz);
        var lowEdge = Portable.Tan(Math.PI * lowHz / rateHz);
        var highEdge = Portable.Tan(Math.PI * highHz / rateHz);
        var (width, centreSquare) = (highEdge - lowEdge, lowEdge * highEdge);

        var sections = new List<SecondOrderSection>(order);
        if (order % 2 == 1) sections.Add(Band(width, width / 2, centreSquare));
        for (var k = order / 2; k >= 1; k--)
        {
            var (damping, frequency) = PrototypePole(order, k);
            var (near, far) = PoleSplit.Of(damping * width, frequency * width, centreSquare);
            sections.Add(Band(width, near.Sigma, near.Square));
            sections.Add(Band(width, far.Sigma, far.Square));
        }

        return new SecondOrderSections(rateHz, sections);
    }

    /// <summary>Takes away what lies between two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="lowHz">Lower edge (−3 dB), above 0.</param>
    /// <param name="highHz">Upper edge (−3 dB), above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections, gain 1 at 0 Hz and at half the rate, 0 at the band's (warped geometric) centre.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandStop(int order, double lowHz, double highHz, double rateHz)
    {
        DesignLimits.Order(order);
        var pairs = new PrototypePair[order / 2];
        for (var k = 1; k <= pairs.Length; k++)
        {
            var (damping, frequency) = PrototypePole(order, k);
            pairs[^k] = new PrototypePair(damping, frequency, ZeroInverseSquare: 0);
        }

        return new LowPassPrototype(pairs, order % 2 == 1 ? 1 : double.NaN, gainForConstant: 1).BandStop(lowHz, highHz, rateHz);
    }

    private static SecondOrderSections OneEdge(int order, double cutoffHz, double rateHz, bool isHighPass)
    {
        DesignLimits.Order(order);
        DesignLimits.Frequency(nameof(cutoffHz), cutoffHz, rateHz);
        var edge = Portable.Tan(Math.PI * cutoffHz / rateHz);

        var sections = new List<SecondOrderSection>((order + 1) / 2);
        if (order % 2 == 1)
        {
            var b = (isHighPass ? 1 : edge) / (1 + edge);
            sections.Add(new SecondOrderSection(b, isHighPass ? -b : b, 0, (edge - 1) / (1 + edge), 0));
        }

        for (var k = order / 2; k >= 1; k--)
        {
            var sigma = PrototypePole(order, k).Damping * edge;
            var (a1, a2, a0) = Denominator(sigma, edge * edge);
            var b = (isHighPass ? 1 : edge * edge) / a0;
            sections.Add(new SecondOrderSection(b, isHighPass ? -2 * b : 2 * b, b, a1, a2));
        }

        return new SecondOrderSections(rateHz, sections);
    }

    /// <summary>Pole k of the analog low-pass with edge 1, −damping ± j·frequency; k = 1 is the least damped.</summary>
    private static (double Damping, double Frequency) PrototypePole(int order, int k) =>
        Portable.SinCos(Math.PI * ((2 * k) - 1) / (2.0 * order));

    /// <summary>The section that width·s / (s² + 2σs + m) becomes.</summary>
    private static SecondOrderSection Band(double width, double sigma, double square)
    {
        var (a1, a2, a0) = Denominator(sigma, square);
        return new SecondOrderSection(width / a0, 0, -width / a0, a1, a2);
    }

    private static (double A1, double A2, double A0) Denominator(double sigma, double square)
    {
        var a0 = 1 + (2 * sigma) + square;
        return (2 * (square - 1) / a0, (1 - (2 * sigma) + square) / a0, a0);
    }
}
