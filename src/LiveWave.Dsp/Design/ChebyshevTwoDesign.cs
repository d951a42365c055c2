namespace LiveWave.Dsp;

/// <summary>
/// Chebyshev filters of the second kind: flat in the band, and outside it nowhere less than a given attenuation, which recurs between
/// zeros. Much shorter delay in the band than a Butterworth filter that takes away as much.
/// </summary>
/// <remarks>
/// Edges are those of what is taken away: the attenuation is reached there for the first time; the band that stays ends earlier.
/// Analog poles 1/(−sinh μ·sin θ ± j·cosh μ·cos θ), zeros ±j/cos θ, θ = (2k − 1)π/(2·order), μ = asinh(√(10^(dB/10) − 1))/order
/// (Parks and Burrus 1987), by the bilinear transform.
/// </remarks>
public static class ChebyshevTwoDesign
{
    /// <summary>Lets through what lies below an edge.</summary>
    /// <param name="order">1 to 16.</param>
    /// <param name="attenuationDb">Least attenuation from the edge on, above 0, at most 200.</param>
    /// <param name="stopHz">Edge of what is taken away, above 0, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>(order + 1) / 2 sections, gain 1 at 0 Hz.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections LowPass(int order, double attenuationDb, double stopHz, double rateHz) =>
        Prototype(order, attenuationDb).LowPass(stopHz, rateHz);

    /// <summary>Lets through what lies above an edge.</summary>
    /// <param name="order">1 to 16. An even order does not take offsets away completely.</param>
    /// <param name="attenuationDb">Least attenuation up to the edge, above 0, at most 200.</param>
    /// <param name="stopHz">Edge of what is taken away, above 0, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>(order + 1) / 2 sections, gain 1 at half the rate.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections HighPass(int order, double attenuationDb, double stopHz, double rateHz) =>
        Prototype(order, attenuationDb).HighPass(stopHz, rateHz);

    /// <summary>Lets through what lies inside two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="attenuationDb">Least attenuation outside the edges, above 0, at most 200.</param>
    /// <param name="lowHz">Lower edge of the band outside which all is taken away, above 0.</param>
    /// <param name="highHz">Upper edge, above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections, gain 1 at the band's (warped geometric) centre.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandPass(int order, double attenuationDb, double lowHz, double highHz, double rateHz) =>
        Prototype(order, attenuationDb).BandPass(lowHz, highHz, rateHz);

    /// <summary>Takes away what lies between two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="attenuationDb">Least attenuation between the edges, above 0, at most 200.</param>
    /// <param name="lowHz">Lower edge of what is taken away, above 0.</param>
    /// <param name="highHz">Upper edge, above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections, gain 1 at 0 Hz and at half the rate.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandStop(int order, double attenuationDb, double lowHz, double highHz, double rateHz) =>
        Prototype(order, attenuationDb).BandStop(lowHz, highHz, rateHz);

    private static LowPassPrototype Prototype(int order, double attenuationDb)
    {
        DesignLimits.Order(order);
        DesignLimits.Attenuation(attenuationDb);
        var (sinh, cosh) = Hyperbolic.OfShare(Math.Sqrt(Decibels.PowerAboveOne(attenuationDb)), order);
        var pairs = new PrototypePair[order / 2];
        for (var k = 1; k <= pairs.Length; k++)
        {
            var (sine, cosine) = Portable.SinCos(Math.PI * ((2 * k) - 1) / (2.0 * order));
            var (damping, frequency) = (sinh * sine, cosh * cosine);
            var square = (damping * damping) + (frequency * frequency);
            pairs[^k] = new PrototypePair(damping / square, frequency / square, cosine * cosine);
        }

        return new LowPassPrototype(pairs, order % 2 == 1 ? 1 / sinh : double.NaN, gainForConstant: 1);
    }
}
