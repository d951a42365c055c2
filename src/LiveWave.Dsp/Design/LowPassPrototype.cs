namespace LiveWave.Dsp;

/// <summary>
/// An analog low-pass of edge 1, and the digital filters that it turns into: edges are pre-warped, pairs of poles go with the zeros that
/// belong to them, quadratic by quadratic, so that no product of roots is rounded.
/// </summary>
/// <param name="pairs">From the most to the least damped; may be empty.</param>
/// <param name="realPole">Size of the pole without a partner, of odd orders; NaN: none.</param>
/// <param name="gainForConstant">Gain at 0 Hz.</param>
/// <remarks>
/// Frequencies are W = tan(π·f/rate). Low-pass s → s/W; high-pass s → W/s; band-pass s → (s² + c)/(w·s) and band-stop its inverse, w = W2 − W1,
/// c = W1·W2. Sections run from the most to the least damped.
/// </remarks>
internal sealed class LowPassPrototype(IReadOnlyList<PrototypePair> pairs, double realPole, double gainForConstant)
{
    private bool HasRealPole => !double.IsNaN(realPole);

    /// <summary>Lets through what lies below an edge.</summary>
    public SecondOrderSections LowPass(double cutoffHz, double rateHz)
    {
        var edge = Edge(cutoffHz, rateHz);
        var sections = new List<SecondOrderSection>(pairs.Count + 1);
        if (HasRealPole) sections.Add(FirstOrder(edge * realPole, isHighPass: false));
        foreach (var pair in pairs)
        {
            var square = pair.Square * edge * edge;
            sections.Add(new AnalogSection(pair.Square * pair.ZeroInverseSquare, 0, square, pair.Damping * edge, square).Digital());
        }

        return Made(rateHz, sections);
    }

    /// <summary>Lets through what lies above an edge.</summary>
    public SecondOrderSections HighPass(double cutoffHz, double rateHz)
    {
        var edge = Edge(cutoffHz, rateHz);
        var sections = new List<SecondOrderSection>(pairs.Count + 1);
        if (HasRealPole) sections.Add(FirstOrder(edge / realPole, isHighPass: true));
        foreach (var pair in pairs)
        {
            var (zero, sigma) = (pair.ZeroInverseSquare * edge * edge, pair.Damping / pair.Square * edge);
            sections.Add(new AnalogSection(1, 0, zero, sigma, edge * edge / pair.Square).Digital());
        }

        return Made(rateHz, sections);
    }

    /// <summary>Lets through what lies between two edges.</summary>
    public SecondOrderSections BandPass(double lowHz, double highHz, double rateHz)
    {
        var (width, centreSquare) = Band(lowHz, highHz, rateHz);
        var sections = new List<SecondOrderSection>((2 * pairs.Count) + 1);
        if (HasRealPole) sections.Add(new AnalogSection(0, realPole * width, 0, realPole * width / 2, centreSquare).Digital());
        foreach (var pair in pairs)
        {
            var (near, far) = PoleSplit.Of(pair.Damping * width, pair.Frequency * width, centreSquare);
            var zero = pair.ZeroInverseSquare;
            var farZero = (width + Math.Sqrt((width * width) + (4 * centreSquare * zero))) / 2;      // times √u, which may be 0
            var lower = new AnalogSection(1, 0, zero * Squared(centreSquare / farZero), near.Sigma, near.Square);
            var upper = new AnalogSection(zero, 0, Squared(farZero), far.Sigma, far.Square).Times(pair.Square);
            var share = lower.GainAt(centreSquare);      // both sections have a gain near the pair's in the band
            sections.Add(lower.Times(1 / share).Digital());
            sections.Add(upper.Times(share).Digital());
        }

        return Made(rateHz, sections);
    }

    /// <summary>Takes away what lies between two edges.</summary>
    public SecondOrderSections BandStop(double lowHz, double highHz, double rateHz)
    {
        var (width, centreSquare) = Band(lowHz, highHz, rateHz);
        var sections = new List<SecondOrderSection>((2 * pairs.Count) + 1);
        if (HasRealPole) sections.Add(new AnalogSection(1, 0, centreSquare, width / (2 * realPole), centreSquare).Digital());
        foreach (var pair in pairs)
        {
            var turned = width / pair.Square;       // the pole 1/p
            var (near, far) = PoleSplit.Of(pair.Damping * turned, pair.Frequency * turned, centreSquare);
            var zeroWidth = Math.Sqrt(pair.ZeroInverseSquare) * width;
            var farZero = (zeroWidth + Math.Sqrt((zeroWidth * zeroWidth) + (4 * centreSquare))) / 2;
            sections.Add(new AnalogSection(1, 0, Squared(centreSquare / farZero), near.Sigma, near.Square).Digital());
            sections.Add(new AnalogSection(1, 0, Squared(farZero), far.Sigma, far.Square).Digital());
        }

        return Made(rateHz, sections);
    }

    private static double Edge(double cutoffHz, double rateHz)
    {
        DesignLimits.Frequency(nameof(cutoffHz), cutoffHz, rateHz);
        return Portable.Tan(Math.PI * cutoffHz / rateHz);
    }

    private static (double Width, double CentreSquare) Band(double lowHz, double highHz, double rateHz)
    {
        DesignLimits.Edges(lowHz, highHz, rateHz);
        var (low, high) = (Portable.Tan(Math.PI * lowHz / rateHz), Portable.Tan(Math.PI * highHz / rateHz));
        return (high - low, low * high);
    }

    private static SecondOrderSection FirstOrder(double pole, bool isHighPass)
    {
        var b = (isHighPass ? 1 : pole) / (1 + pole);
        return new SecondOrderSection(b, isHighPass ? -b : b, 0, (pole - 1) / (1 + pole), 0);
    }

    private static double Squared(double value) => value * value;

    private SecondOrderSections Made(double rateHz, List<SecondOrderSection> sections)
    {
        var (b0, b1, b2, a1, a2) = sections[0];
        sections[0] = new SecondOrderSection(b0 * gainForConstant, b1 * gainForConstant, b2 * gainForConstant, a1, a2);
        return new SecondOrderSections(rateHz, sections);
    }
}
