namespace LiveWave.Dsp;

/// <summary>
/// Elliptic filters (Cauer): the steepest edge of any order, for a ripple in the band and an attenuation outside it that recurs between zeros.
/// Their phase bends strongly towards the edge.
/// </summary>
/// <remarks>
/// Edges are those of the band: the gain falls below the ripple there for the last time. Zeros at ±j/(k·cd(u·K, k)), poles at
/// j·cd((u − j·v)·K, k), u = (2i − 1)/order, sn(j·v·order·K1, k1) = j/ε (Orfanidis 2006), by the bilinear transform. Without a high-pass: its
/// zeros beside 0 Hz let offsets through; take <see cref="ButterworthDesign"/>.
/// </remarks>
public static class EllipticDesign
{
    /// <summary>Lets through what lies below an edge.</summary>
    /// <param name="order">1 to 16.</param>
    /// <param name="rippleDb">How far the gain may fall in the band, at least 0.000001, below <paramref name="attenuationDb"/>.</param>
    /// <param name="attenuationDb">Least attenuation of what is taken away, at most 200.</param>
    /// <param name="cutoffHz">Edge of the band, above 0, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns>(order + 1) / 2 sections; the largest gain is 1, at 0 Hz where the order is odd.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections LowPass(int order, double rippleDb, double attenuationDb, double cutoffHz, double rateHz) =>
        Prototype(order, rippleDb, attenuationDb).LowPass(cutoffHz, rateHz);

    /// <summary>Lets through what lies between two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="rippleDb">How far the gain may fall in the band, at least 0.000001, below <paramref name="attenuationDb"/>.</param>
    /// <param name="attenuationDb">Least attenuation of what is taken away, at most 200.</param>
    /// <param name="lowHz">Lower edge of the band, above 0.</param>
    /// <param name="highHz">Upper edge, above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections; the largest gain is 1.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandPass(
        int order, double rippleDb, double attenuationDb, double lowHz, double highHz, double rateHz) =>
        Prototype(order, rippleDb, attenuationDb).BandPass(lowHz, highHz, rateHz);

    /// <summary>Takes away what lies between two edges.</summary>
    /// <param name="order">1 to 16: order of each flank; the filter has twice as many poles.</param>
    /// <param name="rippleDb">How far the gain may fall outside the edges, at least 0.000001, below <paramref name="attenuationDb"/>.</param>
    /// <param name="attenuationDb">Least attenuation of what is taken away, at most 200.</param>
    /// <param name="lowHz">Lower edge: what lies below it stays; above 0.</param>
    /// <param name="highHz">Upper edge: what lies above it stays; above <paramref name="lowHz"/>, below half the rate.</param>
    /// <param name="rateHz">Sampling rate, above 0.</param>
    /// <returns><paramref name="order"/> sections; the largest gain is 1, at 0 Hz where the order is odd.</returns>
    /// <exception cref="Abstractions.RefusedException">A value is out of its range.</exception>
    public static SecondOrderSections BandStop(
        int order, double rippleDb, double attenuationDb, double lowHz, double highHz, double rateHz) =>
        Prototype(order, rippleDb, attenuationDb).BandStop(lowHz, highHz, rateHz);

    private static LowPassPrototype Prototype(int order, double rippleDb, double attenuationDb)
    {
        DesignLimits.Order(order);
        DesignLimits.Ripple(rippleDb, attenuationDb);
        var rippleSquare = Decibels.PowerAboveOne(rippleDb);        // ε²
        var k1 = Math.Sqrt(rippleSquare / Decibels.PowerAboveOne(attenuationDb));
        var k = EllipticModulus.Of(order, k1);
        DesignLimits.Steepness(k, order);
        var functions = new LandenSequence(k);
        var (sinh, cosh) = Hyperbolic.OfShare(new LandenSequence(k1).ToHyperbolicSine(1 / Math.Sqrt(rippleSquare)), order);

        var pairs = new PrototypePair[order / 2];
        for (var i = 1; i <= pairs.Length; i++)
        {
            var (sine, cosine) = Portable.SinCos(Math.PI * ((2 * i) - 1) / (2.0 * order));
            var zero = k * functions.FromCosine(cosine, 0).Re;
            var (re, im) = functions.FromCosine(cosine * cosh, sine * sinh);      // cos((u − j·v)·π/2); the pole is j times this
            pairs[^i] = new PrototypePair(im, re, zero * zero);
        }

        var realPole = order % 2 == 1 ? functions.FromCosine(0, sinh).Im : double.NaN;
        return new LowPassPrototype(pairs, realPole, order % 2 == 1 ? 1 : 1 / Math.Sqrt(1 + rippleSquare));
    }
}
