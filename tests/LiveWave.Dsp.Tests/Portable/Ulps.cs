namespace LiveWave.Dsp.Tests;

/// <summary>Distance of two doubles, counted in representable numbers.</summary>
internal static class Ulps
{
    public static long Between(double a, double b)
    {
        if (double.IsNaN(a) || double.IsNaN(b)) return double.IsNaN(a) && double.IsNaN(b) ? 0 : long.MaxValue;
        var distance = Ordered(a) - (Int128)Ordered(b);
        return (long)Int128.Abs(distance);
    }

    // Bit patterns of doubles count up with the value; those of negative ones count down.
    private static long Ordered(double value)
    {
        var bits = BitConverter.DoubleToInt64Bits(value);
        return bits < 0 ? long.MinValue - bits : bits;
    }
}
