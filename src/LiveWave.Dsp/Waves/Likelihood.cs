namespace LiveWave.Dsp;

/// <summary>How much likelier a template makes a frame than noise alone does (<see cref="TemplateBank"/> has the formulas).</summary>
internal readonly struct Likelihood
{
    private const double MostExplained = 1 - 1e-12;    // a frame without noise would be infinitely likely

    private readonly double _perEnergy;
    private readonly double _freedom;
    private readonly double _weight;
    private readonly double _penalty;

    /// <summary>For one denominator.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="denominator">hᴴC⁻¹h.</param>
    public Likelihood(WhitenedFrame frame, double denominator)
    {
        var gain = denominator * frame.Power / frame.Energy;
        _perEnergy = 1 / (denominator * frame.Energy);
        _freedom = frame.ObservedCount - 1;
        _weight = gain / (1 + gain);
        _penalty = Portable.Log(1 + gain);
    }

    /// <summary>Λ.</summary>
    /// <param name="squaredNumerator">|hᴴC⁻¹z|².</param>
    public double Lambda(double squaredNumerator)
    {
        var explained = Math.Min(squaredNumerator * _perEnergy, MostExplained);
        return -_freedom * Portable.Log(1 - explained) * _weight - _penalty;
    }

    /// <summary>Gain of one template over another, (N − 1) ln((1 − η of the other)/(1 − η)).</summary>
    /// <param name="explained">Share of the whitened energy that the first explains.</param>
    /// <param name="explainedByOther">Share that the other explains.</param>
    /// <param name="count">Channels observed.</param>
    public static double Gain(double explained, double explainedByOther, int count) =>
        (count - 1) * Portable.Log((1 - Math.Min(explainedByOther, MostExplained)) / (1 - Math.Min(explained, MostExplained)));
}
