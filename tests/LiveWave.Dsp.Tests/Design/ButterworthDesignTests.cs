using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class ButterworthDesignTests
{
    private const double RateHz = 1000;

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_low_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c)
    {
        var (order, edge, at) = ((int)(a % 8) + 1, Between(b, 2, 480), Between(c, 1, 490));
        var design = ButterworthDesign.LowPass(order, edge, RateHz);

        return IsNear(GainOf(design, at), 1 / Math.Sqrt(1 + Math.Pow(Warped(at) / Warped(edge), 2 * order)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_high_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c)
    {
        var (order, edge, at) = ((int)(a % 8) + 1, Between(b, 2, 480), Between(c, 1, 490));
        var design = ButterworthDesign.HighPass(order, edge, RateHz);

        return IsNear(GainOf(design, at), 1 / Math.Sqrt(1 + Math.Pow(Warped(edge) / Warped(at), 2 * order)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool A_band_pass_has_the_closed_form_s_gain_everywhere(uint a, uint b, uint c, uint d)
    {
        var (order, low, at) = ((int)(a % 6) + 1, Between(b, 4, 300), Between(c, 1, 490));
        var high = low + Between(d, 3, 180);
        var design = ButterworthDesign.BandPass(order, low, high, RateHz);

        var (w, w1, w2) = (Warped(at), Warped(low), Warped(high));
        return IsNear(GainOf(design, at), 1 / Math.Sqrt(1 + Math.Pow(((w * w) - (w1 * w2)) / (w * (w2 - w1)), 2 * order)));
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public bool The_declared_group_delay_is_the_slope_of_the_phase(uint a, uint b, uint c)
    {
        var (order, low, at) = ((int)(a % 4) + 1, Between(b, 5, 300), Between(c, 3, 490));
        var design = ButterworthDesign.BandPass(order, low, low + 20, RateHz);
        const double StepHz = 1e-3;
        var (re1, im1) = design.ResponseAt(at - StepHz);
        var (re2, im2) = design.ResponseAt(at + StepHz);
        var turned = Math.Atan2((im2 * re1) - (re2 * im1), (re2 * re1) + (im2 * im1));

        return Math.Abs(design.GroupDelaySeconds(at) + (turned / (4 * Math.PI * StepHz))) < 1e-6;
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(4)]
    [InlineData(16)]
    public void Every_section_is_stable_and_runs_after_the_more_damped_ones(int order)
    {
        var design = ButterworthDesign.HighPass(order, 0.5, RateHz);

        Assert.Equal((order + 1) / 2, design.Count);
        for (var i = 0; i < design.Count; i++)
        {
            Assert.True(design[i].IsStable);
            if (i > 1) Assert.True(design[i].A2 > design[i - 1].A2);
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void Where_nothing_gets_through_the_delay_is_what_holds_beside_it(int order)
    {
        var design = ButterworthDesign.HighPass(order, 10, RateHz);

        Assert.Equal(0, GainOf(design, 0));
        Assert.Equal(design.GroupDelaySeconds(1e-4), design.GroupDelaySeconds(0), 1e-9);
    }

    [Fact]
    public void The_same_coefficients_at_twice_the_rate_hold_for_twice_the_frequency()
    {
        var design = ButterworthDesign.BandPass(2, 8, 12, RateHz);

        Assert.Equal(design.ResponseAt(9), design.ResponseAt(18, 2 * RateHz));
        Assert.Equal(1, Portable.Hypot(design.ResponseAt(10).Re, design.ResponseAt(10).Im), 1e-3);
    }

    [Theory]
    [InlineData(2, 600, "cutoffHz 600 is not below half the rate (500 Hz); give frequencies above 0 and below 500 Hz")]
    [InlineData(2, 500, "cutoffHz 500 is not below half the rate (500 Hz); give frequencies above 0 and below 500 Hz")]
    [InlineData(2, 0, "cutoffHz 0 is not above 0 Hz; give frequencies above 0 and below 500 Hz")]
    [InlineData(2, double.NaN, "cutoffHz NaN is not above 0 Hz; give frequencies above 0 and below 500 Hz")]
    [InlineData(17, 10, "order 17 is not 1 to 16; orders 1 to 4 do for most bands")]
    public void A_design_out_of_range_is_refused_with_parameter_limit_and_unit(int order, double cutoffHz, string message)
    {
        Assert.Equal(message, Assert.Throws<RefusedException>(() => ButterworthDesign.LowPass(order, cutoffHz, RateHz)).Message);
        Assert.Equal(message, Assert.Throws<RefusedException>(() => ButterworthDesign.HighPass(order, cutoffHz, RateHz)).Message);
    }

    [Theory]
    [InlineData(12, 8, 1000, "lowHz 12 is not below highHz (8 Hz)")]
    [InlineData(8, 130.5, 256, "highHz 130.5 is not below half the rate (128 Hz)")]
    [InlineData(8, 12, 0, "rateHz 0 is not a finite number above 0 Hz")]
    public void A_band_out_of_order_or_range_is_refused(double lowHz, double highHz, double rateHz, string what) =>
        Assert.Equal(what, Assert.Throws<RefusedException>(() => ButterworthDesign.BandPass(2, lowHz, highHz, rateHz)).What);

    [Fact]
    public void A_section_that_would_run_away_is_refused()
    {
        var refusal = Assert.Throws<RefusedException>(() => new SecondOrderSections(RateHz, new SecondOrderSection(1, 0, 0, -2.1, 1.2)));

        Assert.Contains("section 1 of 1 has a pole outside the unit circle", refusal.What, StringComparison.Ordinal);
    }

    private static double GainOf(SecondOrderSections design, double frequencyHz)
    {
        var (re, im) = design.ResponseAt(frequencyHz);
        return Math.Sqrt((re * re) + (im * im));
    }

    private static double Warped(double frequencyHz) => Math.Tan(Math.PI * frequencyHz / RateHz);

    private static double Between(uint draw, double from, double to) => from + ((to - from) * (draw % 1009) / 1009);

    private static bool IsNear(double value, double wanted) => Math.Abs(value - wanted) <= 1e-9 * wanted;
}
