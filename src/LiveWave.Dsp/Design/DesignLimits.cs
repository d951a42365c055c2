using System.Globalization;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What a filter design may be asked for; each refusal names parameter, limit and unit.</summary>
internal static class DesignLimits
{
    private const int HighestOrder = 16;
    private const double LargestAttenuationDb = 200;
    private const double SmallestRippleDb = 1e-6;
    private const double LargestEdgeRatio = 0.999999;

    public static void Rate(double rateHz)
    {
        if (double.IsFinite(rateHz) && rateHz > 0) return;
        throw new RefusedException(Text($"rateHz {rateHz} is not a finite number above 0 Hz"), "", "give the stream's rate");
    }

    /// <summary>A frequency strictly between 0 and half the rate.</summary>
    public static void Frequency(string parameter, double frequencyHz, double rateHz)
    {
        Rate(rateHz);
        if (!(frequencyHz > 0)) throw Refused($"{parameter} {frequencyHz} is not above 0 Hz", rateHz);
        if (frequencyHz < rateHz / 2) return;
        throw Refused($"{parameter} {frequencyHz} is not below half the rate ({rateHz / 2} Hz)", rateHz);
    }

    /// <summary>Two frequencies in order.</summary>
    public static void Edges(double lowHz, double highHz, double rateHz)
    {
        Frequency(nameof(lowHz), lowHz, rateHz);
        Frequency(nameof(highHz), highHz, rateHz);
        if (lowHz < highHz) return;
        throw Refused($"lowHz {lowHz} is not below highHz ({highHz} Hz)", rateHz);
    }

    public static void Order(int order)
    {
        if (order is >= 1 and <= HighestOrder) return;
        throw new RefusedException(Text($"order {order} is not 1 to {HighestOrder}"), "", "orders 1 to 4 do for most bands");
    }

    public static void Quality(double quality)
    {
        if (double.IsFinite(quality) && quality > 0) return;
        throw new RefusedException(
            Text($"quality {quality} is not a finite number above 0"), "", "30 makes a notch of 50 Hz about 1.7 Hz wide");
    }

    /// <summary>How far what is taken away lies below what stays.</summary>
    public static void Attenuation(double attenuationDb)
    {
        if (attenuationDb is > 0 and <= LargestAttenuationDb) return;
        throw new RefusedException(
            Text($"attenuationDb {attenuationDb} is not above 0 and at most {LargestAttenuationDb} dB"), "", "40 to 80 dB do for most filters");
    }

    /// <summary>How far the gain may fall in the band, and below it what is taken away.</summary>
    public static void Ripple(double rippleDb, double attenuationDb)
    {
        Attenuation(attenuationDb);
        if (rippleDb >= SmallestRippleDb && rippleDb < attenuationDb) return;
        throw new RefusedException(
            Text($"rippleDb {rippleDb} is not at least 0.000001 dB and below attenuationDb ({attenuationDb} dB)"), "", "0.1 to 1 dB do for most filters");
    }

    /// <summary>What lies between an elliptic filter's two edges, as their ratio: beyond this, doubles don't tell them apart.</summary>
    public static void Steepness(double edgeRatio, int order)
    {
        if (edgeRatio is > 0 and < LargestEdgeRatio) return;
        throw new RefusedException(
            Text($"order {order} is far more than this ripple and attenuation need"), "", "lower the order, or raise attenuationDb or lower rippleDb");
    }

    /// <summary>Numbers as 1.5, whatever the locale.</summary>
    public static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);

    private static RefusedException Refused(FormattableString what, double rateHz) =>
        new(Text(what), "", Text($"give frequencies above 0 and below {rateHz / 2} Hz"));
}
