using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class NotchDesignTests
{
    [Fact]
    public void A_notch_takes_its_centre_away_and_leaves_the_ends()
    {
        var notch = NotchDesign.Notch(50, 30, 1000);

        Assert.Equal(0, Gain(notch, 50), 1e-12);
        Assert.Equal(1, Gain(notch, 0), 1e-12);
        Assert.Equal(1, Gain(notch, 500), 1e-12);
    }

    [Theory]
    [InlineData(50, 30)]
    [InlineData(120, 10)]
    public void Quality_is_the_centre_over_the_width_at_minus_3_dB(double centreHz, double quality)
    {
        var notch = NotchDesign.Notch(centreHz, quality, 1000);

        // the two edges lie so that tan((w2 − w1)/2) = tan(w/(2·quality)), symmetric in warped frequency
        var (low, high) = (EdgeBetween(notch, centreHz * 0.5, centreHz), EdgeBetween(notch, centreHz * 1.5, centreHz));

        Assert.Equal(centreHz / quality, high - low, 1e-6);
    }

    [Theory]
    [InlineData(500, 30, "centreHz 500 is not below half the rate (500 Hz)")]
    [InlineData(-50, 30, "centreHz -50 is not above 0 Hz")]
    [InlineData(50, 0, "quality 0 is not a finite number above 0")]
    public void A_notch_out_of_range_is_refused(double centreHz, double quality, string what) =>
        Assert.Equal(what, Assert.Throws<RefusedException>(() => NotchDesign.Notch(centreHz, quality, 1000)).What);

    private static double EdgeBetween(SecondOrderSections notch, double open, double closed)
    {
        for (var i = 0; i < 100; i++)
        {
            var middle = (open + closed) / 2;
            if (Gain(notch, middle) > Math.Sqrt(0.5)) open = middle;
            else closed = middle;
        }

        return open;
    }

    private static double Gain(SecondOrderSections notch, double frequencyHz)
    {
        var (re, im) = notch.ResponseAt(frequencyHz);
        return Math.Sqrt((re * re) + (im * im));
    }
}
