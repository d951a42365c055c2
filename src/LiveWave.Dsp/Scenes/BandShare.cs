namespace LiveWave.Dsp;

/// <summary>Which share of a process's variance lies in a band, in closed form.</summary>
internal static class BandShare
{
    /// <summary>Of white noise.</summary>
    public static double White(double lowHz, double highHz, double rateHz) => 2 * (highHz - lowHz) / rateHz;

    /// <summary>Of a bank of first-order processes.</summary>
    public static double Of(FirstOrderBank bank, double lowHz, double highHz)
    {
        var share = 0.0;
        for (var i = 0; i < bank.Poles.Length; i++)
        {
            share += 2 * bank.Shares[i] * Mass(bank.Poles[i], 0, Angle(lowHz, bank.RateHz), Angle(highHz, bank.RateHz));
        }

        return share;
    }

    /// <summary>Of the real part of a complex first-order process.</summary>
    /// <param name="pole">The pole's modulus.</param>
    /// <param name="centreHz">The pole's frequency.</param>
    /// <param name="lowHz">Lower edge.</param>
    /// <param name="highHz">Upper edge.</param>
    /// <param name="rateHz">Sampling rate.</param>
    public static double Oscillator(double pole, double centreHz, double lowHz, double highHz, double rateHz)
    {
        var (centre, low, high) = (Angle(centreHz, rateHz), Angle(lowHz, rateHz), Angle(highHz, rateHz));
        return Mass(pole, centre, low, high) + Mass(pole, -centre, low, high);
    }

    private static double Angle(double frequencyHz, double rateHz) => 2 * Math.PI * frequencyHz / rateHz;

    /// <summary>Share of Poisson's kernel about a centre that lies between two angles, radians.</summary>
    private static double Mass(double pole, double centre, double low, double high) =>
        (Cumulated(pole, high - centre) - Cumulated(pole, low - centre)) / Math.PI;

    private static double Cumulated(double pole, double angle)
    {
        var (sine, cosine) = Portable.SinCos(0.5 * angle);
        return Portable.Atan2((1 + pole) * sine, (1 - pole) * cosine);
    }
}
