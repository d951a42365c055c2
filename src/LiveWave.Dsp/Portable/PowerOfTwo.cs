namespace LiveWave.Dsp;

/// <summary>Exact powers of two, made of bits.</summary>
internal static class PowerOfTwo
{
    private const int Bias = 1023;
    private const int MantissaBits = 52;

    /// <summary>2 to the power of <paramref name="exponent"/>, −1022 to 1023.</summary>
    public static double Of(int exponent) => BitConverter.Int64BitsToDouble((long)(exponent + Bias) << MantissaBits);
}
