using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class EllipticDesignTests
{
    private const double RateHz = 1000;

    [Theory]
    [InlineData(1, 1, 20)]
    [InlineData(2, 3, 40)]
    [InlineData(5, 0.01, 60)]
    [InlineData(8, 0.5, 100)]
    public void The_gain_ripples_in_the_band_and_outside_between_what_was_asked_for(int order, double rippleDb, double attenuationDb)
    {
        var design = EllipticDesign.LowPass(order, rippleDb, attenuationDb, 100, RateHz);
        var (lowest, highest, largestBeyond) = (double.MaxValue, 0.0, 0.0);
        var wasBelow = false;
        for (var atHz = 0.05; atHz < 500; atHz += 0.05)
        {
            var gain = GainOf(design, atHz);
            if (atHz <= 100) (lowest, highest) = (Math.Min(lowest, gain), Math.Max(highest, gain));
            wasBelow |= gain <= Ratio(attenuationDb);
            if (wasBelow) largestBeyond = Math.Max(largestBeyond, gain);
        }

        Assert.Equal(Ratio(rippleDb), GainOf(design, 100), 1e-11);
        Assert.Equal(Ratio(rippleDb), lowest, 1e-4);
        Assert.Equal(1, highest, 1e-6);
        Assert.InRange(largestBeyond, 0, Ratio(attenuationDb) * (1 + 1e-9));
        if (order > 2) Assert.True(largestBeyond > 0.99 * Ratio(attenuationDb));
    }

    [Property(Replay = "2026,1201", MaxTest = 200)]
    public bool A_band_pass_and_a_band_stop_are_the_low_pass_on_another_axis(uint a, uint b, uint c, uint d)
    {
        var (order, low, at) = ((int)(a % 7) + 1, Between(b, 4, 300), Between(c, 1, 490));
        var high = low + Between(d, 3, 180);
        var (w, w1, w2) = (Warped(at), Warped(low), Warped(high));
        var asLowPass = Math.Abs(((w * w) - (w1 * w2)) / (w * (w2 - w1)));

        var pass = GainOf(EllipticDesign.BandPass(order, 0.5, 50, low, high, RateHz), at);
        var stop = GainOf(EllipticDesign.BandStop(order, 0.5, 50, low, high, RateHz), at);

        return Math.Abs(pass - LowPassGain(order, asLowPass)) < 1e-9 && Math.Abs(stop - LowPassGain(order, 1 / asLowPass)) < 1e-9;
    }

    [Fact]
    public void Group_delay_is_the_slope_of_the_phase()
    {
        const double StepHz = 1e-3;
        var design = EllipticDesign.BandPass(4, 0.5, 40, 8, 12, RateHz);
        foreach (var atHz in (double[])[5, 8.5, 10, 11.9, 30])
        {
            var (re1, im1) = design.ResponseAt(atHz - StepHz);
            var (re2, im2) = design.ResponseAt(atHz + StepHz);
            var turned = Math.Atan2((im2 * re1) - (re2 * im1), (re2 * re1) + (im2 * im1));

            Assert.Equal(-turned / (4 * Math.PI * StepHz), design.GroupDelaySeconds(atHz), 2e-5);
        }
    }

    [Theory]
    [InlineData(4, 0, 40, "rippleDb 0 is not at least 0.000001 dB and below attenuationDb (40 dB)")]
    [InlineData(4, 40, 40, "rippleDb 40 is not at least 0.000001 dB and below attenuationDb (40 dB)")]
    [InlineData(4, 1, 300, "attenuationDb 300 is not above 0 and at most 200 dB")]
    [InlineData(17, 1, 40, "order 17 is not 1 to 16")]
    [InlineData(16, 3, 3.1, "order 16 is far more than this ripple and attenuation need")]
    public void A_design_out_of_range_is_refused(int order, double rippleDb, double attenuationDb, string what) =>
        Assert.Equal(what, Assert.Throws<RefusedException>(() => EllipticDesign.LowPass(order, rippleDb, attenuationDb, 100, RateHz)).What);

    private static double LowPassGain(int order, double frequency)
    {
        // the low-pass with edge W = 1, a quarter of the rate, at the frequency that the bilinear transform puts there
        var atHz = RateHz / Math.PI * Math.Atan(frequency);
        return GainOf(EllipticDesign.LowPass(order, 0.5, 50, RateHz / 4, RateHz), atHz);
    }

    private static double Ratio(double decibels) => Math.Pow(10, -decibels / 20);

    private static double GainOf(SecondOrderSections design, double frequencyHz)
    {
        var (re, im) = design.ResponseAt(frequencyHz);
        return Math.Sqrt((re * re) + (im * im));
    }

    private static double Warped(double frequencyHz) => Math.Tan(Math.PI * frequencyHz / RateHz);

    private static double Between(uint draw, double from, double to) => from + ((to - from) * (draw % 1009) / 1009);
}
