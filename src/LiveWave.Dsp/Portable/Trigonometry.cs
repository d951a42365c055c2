namespace LiveWave.Dsp;

/// <summary>Sine, cosine and tangent behind <see cref="Portable"/>.</summary>
internal static class Trigonometry
{
    public static double Sine(double x)
    {
        if (!double.IsFinite(x)) return double.NaN;
        if (x == 0) return x;

        var quadrant = QuarterTurns.Reduce(Math.Abs(x), out var high, out var low);
        var value = (quadrant & 1) == 0 ? SineNearZero(high, low, out _) : CosineNearZero(high, low, out _);
        return (quadrant & 2) != 0 ^ x < 0 ? -value : value;
    }

    public static double Cosine(double x)
    {
        if (!double.IsFinite(x)) return double.NaN;

        var quadrant = QuarterTurns.Reduce(Math.Abs(x), out var high, out var low);
        var value = (quadrant & 1) == 0 ? CosineNearZero(high, low, out _) : SineNearZero(high, low, out _);
        return quadrant is 1 or 2 ? -value : value;
    }

    public static (double Sine, double Cosine) SineCosine(double x)
    {
        if (!double.IsFinite(x)) return (double.NaN, double.NaN);
        if (x == 0) return (x, 1);

        var quadrant = QuarterTurns.Reduce(Math.Abs(x), out var high, out var low);
        var sine = SineNearZero(high, low, out _);
        var cosine = CosineNearZero(high, low, out _);
        if ((quadrant & 1) != 0) (sine, cosine) = (cosine, sine);
        return ((quadrant & 2) != 0 ^ x < 0 ? -sine : sine, quadrant is 1 or 2 ? -cosine : cosine);
    }

    public static double Tangent(double x)
    {
        if (!double.IsFinite(x)) return double.NaN;
        if (x == 0) return x;

        var quadrant = QuarterTurns.Reduce(Math.Abs(x), out var high, out var low);
        var sine = SineNearZero(high, low, out var sineRest);
        var cosine = CosineNearZero(high, low, out var cosineRest);

        // The rests of both are put back to first order, so that only the division and this sum round.
        double value;
        if ((quadrant & 1) == 0)
        {
            value = sine / cosine;
            value += value * ((sineRest / sine) - (cosineRest / cosine));
        }
        else
        {
            value = -cosine / sine;
            value += value * ((cosineRest / cosine) - (sineRest / sine));
        }

        return x < 0 ? -value : value;
    }

    /// <summary>sin(x + tail), |x| up to π/4: Taylor to x¹⁷, what follows is below 1e-19.</summary>
    private static double SineNearZero(double x, double tail, out double rest)
    {
        const double C3 = -1.0 / 6;
        const double C5 = 1.0 / 120;
        const double C7 = -1.0 / 5040;
        const double C9 = 1.0 / 362880;
        const double C11 = -1.0 / 39916800;
        const double C13 = 1.0 / 6227020800;
        const double C15 = -1.0 / 1307674368000;
        const double C17 = 1.0 / 355687428096000;

        var z = x * x;
        var series = C3 + (z * (C5 + (z * (C7 + (z * (C9 + (z * (C11 + (z * (C13 + (z * (C15 + (z * C17)))))))))))));
        var small = (x * z * series) + (tail * (1 - (0.5 * z)));
        var value = x + small;
        rest = (x - value) + small;
        return value;
    }

    /// <summary>cos(x + tail), |x| up to π/4: Taylor to x¹⁶, what follows is below 1e-17.</summary>
    private static double CosineNearZero(double x, double tail, out double rest)
    {
        const double C4 = 1.0 / 24;
        const double C6 = -1.0 / 720;
        const double C8 = 1.0 / 40320;
        const double C10 = -1.0 / 3628800;
        const double C12 = 1.0 / 479001600;
        const double C14 = -1.0 / 87178291200;
        const double C16 = 1.0 / 20922789888000;

        var z = x * x;
        var series = C4 + (z * (C6 + (z * (C8 + (z * (C10 + (z * (C12 + (z * (C14 + (z * C16)))))))))));
        var half = 0.5 * z;
        var first = 1 - half;
        var small = ((1 - first) - half) + ((z * z * series) - (x * tail));
        var value = first + small;
        rest = (first - value) + small;
        return value;
    }
}
