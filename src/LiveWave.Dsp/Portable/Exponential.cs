namespace LiveWave.Dsp;

/// <summary>Exponential and natural logarithm behind <see cref="Portable"/>.</summary>
internal static class Exponential
{
    // ln 2 in 32 bits, whose products with any exponent are exact, and a rest
    private const double Log2High = 0.6931471803691238;
    private const double Log2Rest = 1.9082149292705877e-10;
    private const double OneOverLog2 = 1.4426950408889634;

    private const double Overflow = 709.782712893384;
    private const double Underflow = -745.1332191019412;

    /// <summary>x = k·ln 2 + r, |r| up to ln 2 / 2; eˣ = 2ᵏ·eʳ, eʳ as Taylor series to r¹⁴.</summary>
    public static double Exp(double x)
    {
        if (double.IsNaN(x)) return x;
        if (x > Overflow) return double.PositiveInfinity;
        if (x < Underflow) return 0;

        var k = Math.Round(x * OneOverLog2);
        var high = x - (k * Log2High);
        var rest = k * Log2Rest;
        var r = high - rest;
        rest = (high - r) - rest;
        var value = 1 + (r + (rest + (r * r * SeriesAfterSecond(r))));

        // In two factors, since 2ᵏ alone may leave the range; only a subnormal result is rounded once more.
        var half = (int)k / 2;
        return value * PowerOfTwo.Of(half) * PowerOfTwo.Of((int)k - half);
    }

    /// <summary>x = m·2ᵏ, √½ &lt; m ≤ √2; ln m = f − f²/2 + s·(f²/2 + R), f = m − 1, s = f/(2 + f), R = 2s²/3 + 2s⁴/5 + …</summary>
    public static double Log(double x)
    {
        const double SquareRootOfTwo = 1.4142135623730951;
        if (double.IsNaN(x) || x < 0) return double.NaN;
        if (x == 0) return double.NegativeInfinity;
        if (double.IsPositiveInfinity(x)) return x;

        var k = 0;
        if (x < PowerOfTwo.Of(-1022))
        {
            x *= PowerOfTwo.Of(54);
            k = -54;
        }

        var bits = BitConverter.DoubleToInt64Bits(x);
        k += (int)(bits >> 52) - 1023;
        var m = BitConverter.Int64BitsToDouble((bits & 0xFFFFFFFFFFFFF) | 0x3FF0000000000000);
        if (m > SquareRootOfTwo)
        {
            m *= 0.5;
            k++;
        }

        var f = m - 1;
        var s = f / (2 + f);
        var halfSquare = 0.5 * f * f;
        var curved = s * (halfSquare + AreaSeries(s * s));
        return (k * Log2High) - ((halfSquare - (curved + (k * Log2Rest))) - f);
    }

    /// <summary>(eʳ − 1 − r)/r², |r| up to 0.35; what is cut off is below 1e-17 of the whole.</summary>
    private static double SeriesAfterSecond(double r)
    {
        const double C3 = 1.0 / 6;
        const double C4 = 1.0 / 24;
        const double C5 = 1.0 / 120;
        const double C6 = 1.0 / 720;
        const double C7 = 1.0 / 5040;
        const double C8 = 1.0 / 40320;
        const double C9 = 1.0 / 362880;
        const double C10 = 1.0 / 3628800;
        const double C11 = 1.0 / 39916800;
        const double C12 = 1.0 / 479001600;
        const double C13 = 1.0 / 6227020800;
        const double C14 = 1.0 / 87178291200;

        var upper = C9 + (r * (C10 + (r * (C11 + (r * (C12 + (r * (C13 + (r * C14)))))))));
        return 0.5 + (r * (C3 + (r * (C4 + (r * (C5 + (r * (C6 + (r * (C7 + (r * (C8 + (r * upper)))))))))))));
    }

    /// <summary>2z/3 + 2z²/5 + … + 2z¹¹/23, z = s² up to 0.0295; what is cut off is below 1e-18.</summary>
    private static double AreaSeries(double z)
    {
        const double C1 = 2.0 / 3;
        const double C2 = 2.0 / 5;
        const double C3 = 2.0 / 7;
        const double C4 = 2.0 / 9;
        const double C5 = 2.0 / 11;
        const double C6 = 2.0 / 13;
        const double C7 = 2.0 / 15;
        const double C8 = 2.0 / 17;
        const double C9 = 2.0 / 19;
        const double C10 = 2.0 / 21;
        const double C11 = 2.0 / 23;

        var upper = C7 + (z * (C8 + (z * (C9 + (z * (C10 + (z * C11)))))));
        return z * (C1 + (z * (C2 + (z * (C3 + (z * (C4 + (z * (C5 + (z * (C6 + (z * upper))))))))))));
    }
}
