namespace LiveWave.Dsp;

/// <summary>
/// Reduces an angle to within an eighth of a turn: x = n·π/2 + high + low, |high| ≤ π/4 (a rounding beyond it at most),
/// low about 2⁻⁵³ of high.
/// </summary>
/// <remarks>
/// Up to 2²⁰ after Cody and Waite (1980): π/2 in three parts of 33 bits, whose products with n are exact, and a rest. Above
/// after Payne and Hanek (1983): the angle times those bits of 2/π that matter modulo four quarter turns.
/// </remarks>
internal static class QuarterTurns
{
    private const double CodyWaiteLimit = 1 << 20;

    // π/2 = PartA + PartB + PartC (33 bits each) + Rest
    private const double PartA = 1.5707963267341256;
    private const double PartB = 6.077100506303966e-11;
    private const double PartC = 2.0222662487111665e-21;
    private const double Rest = 8.4784276603689e-32;

    private const double QuarterPi = 0.7853981633974483;
    private const double TwoOverPi = 0.6366197723675814;

    // π/2 as the nearest double and what that leaves
    private const double HalfPi = 1.5707963267948966;
    private const double HalfPiRest = 6.123233995736766e-17;

    /// <summary>One word of zeros, then the first 1280 bits of 2/π.</summary>
    private static ReadOnlySpan<ulong> TwoOverPiBits =>
    [
        0x0000000000000000,
        0xA2F9836E4E441529, 0xFC2757D1F534DDC0, 0xDB6295993C439041, 0xFE5163ABDEBBC561,
        0xB7246E3A424DD2E0, 0x06492EEA09D1921C, 0xFE1DEB1CB129A73E, 0xE88235F52EBB4484,
        0xE99C7026B45F7E41, 0x3991D639835339F4, 0x9C845F8BBDF9283B, 0x1FF897FFDE05980F,
        0xEF2F118B5A0A6D1F, 0x6D367ECF27CB09B7, 0x4F463F669E5FEA2D, 0x7527BAC7EBE5F17B,
        0x3D0739F78A5292EA, 0x6BFB5FB11F8D5D08, 0x56033046FC7B6BAB, 0xF0CFBC209AF4361D,
    ];

    /// <summary>Reduces an angle.</summary>
    /// <param name="x">Radians, at least 0, finite.</param>
    /// <param name="high">What is left, as the nearest double.</param>
    /// <param name="low">What <paramref name="high"/> leaves.</param>
    /// <returns>n modulo 4.</returns>
    public static int Reduce(double x, out double high, out double low)
    {
        if (x <= QuarterPi)
        {
            high = x;
            low = 0;
            return 0;
        }

        return x < CodyWaiteLimit ? ReduceByParts(x, out high, out low) : ReduceByBits(x, out high, out low);
    }

    private static int ReduceByParts(double x, out double high, out double low)
    {
        var n = Math.Round(x * TwoOverPi);
        var left = x - (n * PartA);                        // exact: both products and difference fit
        var left2 = TwoSum(left, -(n * PartB), out var error2);
        var left3 = TwoSum(left2, -(n * PartC), out var error3);
        var rest = error2 + (error3 - (n * Rest));
        high = left3 + rest;
        low = (left3 - high) + rest;
        return (int)n & 3;
    }

    private static int ReduceByBits(double x, out double high, out double low)
    {
        var bits = BitConverter.DoubleToUInt64Bits(x);
        var mantissa = (bits & 0xFFFFFFFFFFFFF) | 0x10000000000000;
        var exponent = (int)(bits >> 52) - 1075;           // x = mantissa · 2^exponent

        // Bits of 2/π above 2^(2 - exponent) only add whole turns; 256 from there on leave 200 good ones after the product.
        var first = 64 + exponent - 2;
        var (word, shift) = (first / 64, first % 64);
        UInt128 product = (UInt128)mantissa * Window(word + 3, shift);
        product = ((UInt128)mantissa * Window(word + 2, shift)) + (product >> 64);
        var third = (ulong)product;
        product = ((UInt128)mantissa * Window(word + 1, shift)) + (product >> 64);
        var second = (ulong)product;
        var top = (mantissa * Window(word, shift)) + (ulong)(product >> 64);

        // top two bits: quarter turns; the next 128: a fraction of one, read as signed to lie within half a quarter turn
        var fraction = new UInt128((top << 2) | (second >> 62), (second << 2) | (third >> 62));
        var beyondHalf = (int)(fraction >> 127);
        ToRadians(beyondHalf == 0 ? fraction : UInt128.Zero - fraction, out high, out low);
        if (beyondHalf != 0) (high, low) = (-high, -low);
        return ((int)(top >> 62) + beyondHalf) & 3;
    }

    private static ulong Window(int word, int shift) =>
        shift == 0 ? TwoOverPiBits[word] : (TwoOverPiBits[word] << shift) | (TwoOverPiBits[word + 1] >> (64 - shift));

    /// <summary>A fraction of a quarter turn, in units of 2⁻¹²⁸, times π/2.</summary>
    private static void ToRadians(UInt128 fraction, out double high, out double low)
    {
        var zeros = (int)UInt128.LeadingZeroCount(fraction);
        fraction <<= zeros;
        var unit = PowerOfTwo.Of(-53 - zeros);
        var turnsHigh = (long)(ulong)(fraction >> 75) * unit;                                        // first 53 bits
        var turnsLow = ((long)(ulong)(fraction >> 22) & 0x1FFFFFFFFFFFFF) * unit * PowerOfTwo.Of(-53); // next 53 bits

        var product = TwoProduct(turnsHigh, HalfPi, out var error);
        var rest = error + ((turnsHigh * HalfPiRest) + (turnsLow * HalfPi));
        high = product + rest;
        low = (product - high) + rest;
    }

    /// <summary>a + b = result + error, exactly (Knuth 1969).</summary>
    private static double TwoSum(double a, double b, out double error)
    {
        var sum = a + b;
        var shareOfB = sum - a;
        error = (a - (sum - shareOfB)) + (b - shareOfB);
        return sum;
    }

    /// <summary>a · b = result + error, exactly (Dekker 1971).</summary>
    private static double TwoProduct(double a, double b, out double error)
    {
        var product = a * b;
        var (aHigh, aLow) = Halves(a);
        var (bHigh, bLow) = Halves(b);
        error = (((aHigh * bHigh) - product) + (aHigh * bLow) + (aLow * bHigh)) + (aLow * bLow);
        return product;
    }

    private static (double High, double Low) Halves(double a)
    {
        const double Splitter = (1 << 27) + 1;
        var scaled = Splitter * a;
        var high = scaled - (scaled - a);
        return (high, a - high);
    }
}
