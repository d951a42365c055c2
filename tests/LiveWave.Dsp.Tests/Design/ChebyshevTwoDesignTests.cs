using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class ChebyshevTwoDesignTests
{
    private const double RateHz = 1000;

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_low_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c, uint d)
    {
        var (order, edge, at, decibels) = Draw(a, b, c, d);
        var design = ChebyshevTwoDesign.LowPass(order, decibels, edge, RateHz);

        return IsNear(GainOf(design, at), ClosedForm(order, decibels, Warped(at) / Warped(edge)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_high_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c, uint d)
    {
        var (order, edge, at, decibels) = Draw(a, b, c, d);
        var design = ChebyshevTwoDesign.HighPass(order, decibels, edge, RateHz);

        return IsNear(GainOf(design, at), ClosedForm(order, decibels, Warped(edge) / Warped(at)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_band_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c, uint d)
    {
        var (order, low, at, decibels) = Draw(a, b, c, d);
        var high = low + Math.Min(1 + (low / 3), 495 - low);
        var design = ChebyshevTwoDesign.BandPass(order, decibels, low, high, RateHz);

        return IsNear(GainOf(design, at), ClosedForm(order, decibels, AsLowPass(at, low, high)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_band_stop_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c, uint d)
    {
        var (order, low, at, decibels) = Draw(a, b, c, d);
        var high = low + Math.Min(1 + (low / 3), 495 - low);
        var design = ChebyshevTwoDesign.BandStop(order, decibels, low, high, RateHz);

        return IsNear(GainOf(design, at), ClosedForm(order, decibels, 1 / AsLowPass(at, low, high)));
    }

    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    [InlineData(7)]
    public void At_its_edge_and_beyond_all_is_taken_away_that_was_asked_for(int order)
    {
        var design = ChebyshevTwoDesign.LowPass(order, 60, 100, RateHz);

        Assert.Equal(1e-3, GainOf(design, 100), 1e-12);
        for (var atHz = 100.5; atHz < 500; atHz += 0.5) Assert.InRange(GainOf(design, atHz), 0, 1e-3);
        Assert.True(GainOf(design, 99.5) > 1.001e-3);
    }

    [Theory]
    [InlineData(0, "attenuationDb 0 is not above 0 and at most 200 dB")]
    [InlineData(201, "attenuationDb 201 is not above 0 and at most 200 dB")]
    [InlineData(double.NaN, "attenuationDb NaN is not above 0 and at most 200 dB")]
    public void An_attenuation_out_of_range_is_refused(double attenuationDb, string what) =>
        Assert.Equal(what, Assert.Throws<RefusedException>(() => ChebyshevTwoDesign.LowPass(4, attenuationDb, 100, RateHz)).What);

    [Fact]
    public void Edges_and_orders_out_of_range_are_refused()
    {
        Assert.Equal(
            "cutoffHz 500 is not below half the rate (500 Hz)",
            Assert.Throws<RefusedException>(() => ChebyshevTwoDesign.LowPass(4, 40, 500, RateHz)).What);
        Assert.Equal(
            "lowHz 12 is not below highHz (8 Hz)",
            Assert.Throws<RefusedException>(() => ChebyshevTwoDesign.BandPass(4, 40, 12, 8, RateHz)).What);
        Assert.Equal("order 0 is not 1 to 16", Assert.Throws<RefusedException>(() => ChebyshevTwoDesign.HighPass(0, 40, 8, RateHz)).What);
    }

    private static (int Order, double EdgeHz, double AtHz, double Decibels) Draw(uint a, uint b, uint c, uint d) =>
        ((int)(a % 8) + 1, Between(b, 2, 480), Between(c, 1, 490), Between(d, 20, 90));

    /// <summary>1/√(1 + 1/(ε²·T²(1/Ω))), ε² = 1/(10^(dB/10) − 1), T the Chebyshev polynomial.</summary>
    private static double ClosedForm(int order, double decibels, double frequency)
    {
        var x = Math.Abs(1 / frequency);
        var t = x <= 1 ? Math.Cos(order * Math.Acos(x)) : Math.Cosh(order * Math.Acosh(x));
        return double.IsInfinity(t) ? 1 : Math.Abs(t) / Math.Sqrt((t * t) + (Math.Pow(10, decibels / 10) - 1));
    }

    private static double AsLowPass(double atHz, double lowHz, double highHz)
    {
        var (w, low, high) = (Warped(atHz), Warped(lowHz), Warped(highHz));
        return ((w * w) - (low * high)) / (w * (high - low));
    }

    private static double GainOf(SecondOrderSections design, double frequencyHz)
    {
        var (re, im) = design.ResponseAt(frequencyHz);
        return Math.Sqrt((re * re) + (im * im));
    }

    private static double Warped(double frequencyHz) => Math.Tan(Math.PI * frequencyHz / RateHz);

    private static double Between(uint draw, double from, double to) => from + ((to - from) * (draw % 1009) / 1009);

    // Beside a zero the gain is a difference of near equals: so much of the largest gain, 1, and of the gain itself.
    private static bool IsNear(double value, double wanted) => Math.Abs(value - wanted) <= (1e-9 * wanted) + 1e-12;
}
