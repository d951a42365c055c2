namespace LiveWave.Dsp;

/// <summary>Two-argument arc tangent behind <see cref="Portable"/>.</summary>
/// <remarks>
/// In the first octant atan(b/a) = atan(c) + atan((b − c·a)/(a + c·b)) with c the nearest eighth: the second term is at most
/// atan(1/15) and needs a short series. The other octants follow by reflection, the first term and all corrections kept apart.
/// </remarks>
internal static class ArcTangent
{
    private const double Pi = 3.141592653589793;
    private const double PiRest = 1.2246467991473532e-16;
    private const double HalfPi = 1.5707963267948966;
    private const double HalfPiRest = 6.123233995736766e-17;

    /// <summary>atan(k/8), k = 0 … 8, as the nearest double.</summary>
    private static ReadOnlySpan<double> Eighths =>
    [
        0, 0.12435499454676144, 0.24497866312686414, 0.35877067027057225, 0.4636476090008061,
        0.5585993153435624, 0.6435011087932844, 0.7188299996216245, 0.7853981633974483,
    ];

    /// <summary>What <see cref="Eighths"/> leave.</summary>
    private static ReadOnlySpan<double> EighthsRest =>
    [
        0, -3.1253241424539383e-18, 1.0698755618734451e-17, -2.4623815582638635e-17, 2.2698777452961687e-17,
        -5.4556305485916264e-18, 1.5834785051444286e-17, -2.1478388444456983e-17, 3.061616997868383e-17,
    ];

    public static double Of(double y, double x)
    {
        if (double.IsNaN(x) || double.IsNaN(y)) return double.NaN;

        var (right, up) = Scaled(Math.Abs(x), Math.Abs(y));
        var steep = up > right;
        var high = steep ? FirstOctant(right, up, out var low) : FirstOctant(up, right, out low);
        if (steep) high = Reflect(HalfPi, HalfPiRest, high, ref low);
        if (double.IsNegative(x)) high = Reflect(Pi, PiRest, high, ref low);
        return Math.CopySign(high + low, y);
    }

    /// <summary>Same angle, away from overflow, underflow and infinity.</summary>
    private static (double Right, double Up) Scaled(double right, double up)
    {
        var longer = Math.Max(right, up);
        if (double.IsPositiveInfinity(longer)) return (right == longer ? 1 : 0, up == longer ? 1 : 0);
        if (longer > PowerOfTwo.Of(1000)) return (right * 0.25, up * 0.25);
        return longer < PowerOfTwo.Of(-900) ? (right * PowerOfTwo.Of(200), up * PowerOfTwo.Of(200)) : (right, up);
    }

    /// <summary>atan(shorter/longer) as a sum, 0 to π/4.</summary>
    private static double FirstOctant(double shorter, double longer, out double low)
    {
        if (shorter == 0)
        {
            low = 0;
            return 0;
        }

        var k = (int)Math.Round(shorter / longer * 8);
        var c = k * 0.125;
        var t = (shorter - (c * longer)) / (longer + (c * shorter));
        low = t + ((t * Series(t * t)) + EighthsRest[k]);
        return Eighths[k];
    }

    /// <summary>from − (high + low), again as a sum.</summary>
    private static double Reflect(double from, double fromRest, double high, ref double low)
    {
        var difference = from - high;
        low = ((from - difference) - high) + (fromRest - low);
        return difference;
    }

    /// <summary>atan(t)/t − 1 to t¹⁴, t² up to 1/225; what is cut off is below 1e-19.</summary>
    private static double Series(double z)
    {
        const double C3 = -1.0 / 3;
        const double C5 = 1.0 / 5;
        const double C7 = -1.0 / 7;
        const double C9 = 1.0 / 9;
        const double C11 = -1.0 / 11;
        const double C13 = 1.0 / 13;
        const double C15 = -1.0 / 15;

        return z * (C3 + (z * (C5 + (z * (C7 + (z * (C9 + (z * (C11 + (z * (C13 + (z * C15))))))))))));
    }
}
