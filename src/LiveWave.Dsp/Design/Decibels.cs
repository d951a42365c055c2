namespace LiveWave.Dsp;

/// <summary>Decibels in ratios of power.</summary>
internal static class Decibels
{
    private const double NaturalLogarithmOfTen = 2.302585092994045684;
    private const double SmallExponent = 0.25;

    /// <summary>10^(dB/10) − 1, to the last digits for small dB too.</summary>
    /// <param name="decibels">Above 0.</param>
    public static double PowerAboveOne(double decibels)
    {
        var exponent = decibels * NaturalLogarithmOfTen / 10;
        if (exponent > SmallExponent) return Portable.Exp(exponent) - 1;

        var (sum, term) = (0.0, 1.0);       // the exponential's own series, without its 1
        for (var n = 1; n <= 14; n++)
        {
            term *= exponent / n;
            sum += term;
        }

        return sum;
    }
}
