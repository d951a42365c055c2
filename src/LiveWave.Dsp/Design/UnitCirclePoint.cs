namespace LiveWave.Dsp;

/// <summary>The point e^jω at which a section is evaluated.</summary>
internal readonly struct UnitCirclePoint
{
    private readonly double _sine;
    private readonly double _cosine;
    private readonly double _twiceHalfSineSquare;      // 2 sin²(ω/2) = 1 − cos ω, without the cancellation

    /// <param name="radiansPerSample">ω.</param>
    public UnitCirclePoint(double radiansPerSample)
    {
        (_sine, _cosine) = Portable.SinCos(radiansPerSample);
        var half = Portable.Sin(0.5 * radiansPerSample);
        _twiceHalfSineSquare = 2 * half * half;
    }

    /// <summary>u + jv with c0 + c1·e^-jω + c2·e^-2jω = e^-jω · (u + jv).</summary>
    public (double U, double V) Centred(double c0, double c1, double c2) =>
        ((c0 + c1 + c2) - ((c0 + c2) * _twiceHalfSineSquare), (c0 - c2) * _sine);

    /// <summary>−d arg / dω of the same polynomial, samples; at a zero on the circle what holds beside it.</summary>
    public double CentredDelay(double c0, double c1, double c2)
    {
        var (u, v) = Centred(c0, c1, c2);
        var size = (u * u) + (v * v);
        if (size == 0) return c2 == 0 ? 0.5 : 1;      // a single zero, or a symmetric pair

        var slopeOfU = -(c0 + c2) * _sine;
        var slopeOfV = (c0 - c2) * _cosine;
        return 1 - (((slopeOfV * u) - (slopeOfU * v)) / size);
    }
}
