using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class MainsNotchTests
{
    [Theory]
    [InlineData(1000, 50, true, true, true)]
    [InlineData(350, 50, true, true, false)]       // 150 Hz is above 0.4 of the rate
    [InlineData(200, 50, true, false, false)]
    [InlineData(110, 50, true, false, false)]      // the mains itself goes at any rate
    [InlineData(1000, 60, false, false, false)]
    public void The_mains_and_those_harmonics_go_that_lie_below_four_tenths_of_the_rate(
        double rateHz, double mainsHz, bool first, bool second, bool third)
    {
        bool[] goes = [first, second, third];
        for (var harmonic = 1; harmonic <= 3 && harmonic * 50 < rateHz / 2; harmonic++)
        {
            var left = AmplitudeLeft(new MainsNotch(mainsHz), harmonic * 50, rateHz);
            Assert.Equal(goes[harmonic - 1], left < 1e-3);
        }
    }

    [Fact]
    public void A_rhythm_below_the_mains_stays()
    {
        Assert.InRange(AmplitudeLeft(new MainsNotch(50), 18, 1000), 0.99, 1.001);
        Assert.InRange(AmplitudeLeft(new MainsNotch(50, quality: 5), 45, 1000), 0.1, 0.9);
    }

    [Fact]
    public void The_first_row_makes_no_step()
    {
        var notch = new MainsNotch(50);
        notch.Prepare(Signals.Format(1000, 3));
        var output = new double[3];

        for (var i = 0; i < 500; i++)
        {
            Assert.True(notch.Step([4000, -70, 0], output));
            Assert.Equal(4000, output[0], 1e-8);
            Assert.Equal(-70, output[1], 1e-8);
        }
    }

    [Fact]
    public void A_channel_missing_at_first_settles_on_its_first_good_value()
    {
        var notch = new MainsNotch(50);
        notch.Prepare(Signals.Format(1000, 2));
        var output = new double[2];
        for (var i = 0; i < 20; i++)
        {
            notch.Step([5, double.NaN], output);
            Assert.True(double.IsNaN(output[1]));
        }

        for (var i = 0; i < 500; i++)
        {
            notch.Step([5, 900], output);
            Assert.Equal(900, output[1], 1e-8);
        }
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void While_a_value_is_missing_the_filter_is_fed_the_last_good_one(double missing)
    {
        var (gap, held) = (new MainsNotch(50), new MainsNotch(50));
        gap.Prepare(Signals.Format(1000, 1));
        held.Prepare(Signals.Format(1000, 1));
        var rows = Signals.Noise(3, 300, 1);
        var (a, b) = (new double[1], new double[1]);

        for (var i = 0; i < rows.Length; i++)
        {
            var isMissing = i is >= 100 and < 140;
            gap.Step(isMissing ? [missing] : rows[i], a);
            held.Step(isMissing ? rows[99] : rows[i], b);

            Assert.Equal(isMissing ? double.NaN : b[0], a[0]);
        }
    }

    [Fact]
    public void A_rate_too_low_for_the_mains_is_refused()
    {
        var refusal = Assert.Throws<RefusedException>(() => new MainsNotch(50).Prepare(Signals.Format(100, 1)));

        Assert.Equal("mainsHz 50 is not below half the rate (50 Hz); give frequencies above 0 and below 50 Hz", refusal.Message);
    }

    [Fact]
    public void What_makes_no_sense_is_refused_at_once()
    {
        Assert.Equal("mainsHz 0 is not a finite number above 0 Hz", Assert.Throws<RefusedException>(() => new MainsNotch(0)).What);
        Assert.Equal("quality -1 is not a finite number above 0", Assert.Throws<RefusedException>(() => new MainsNotch(50, -1)).What);
        Assert.Throws<InvalidOperationException>(() => new MainsNotch(50).DelaySeconds(10));
    }

    /// <summary>Amplitude that is left of a sine of amplitude 1, three seconds after it began.</summary>
    private static double AmplitudeLeft(MainsNotch notch, double frequencyHz, double rateHz)
    {
        notch.Prepare(Signals.Format(rateHz, 1));
        var (output, re, im) = (new double[1], 0.0, 0.0);
        var (from, to) = ((int)(3 * rateHz), (int)(5 * rateHz));
        for (var i = 0; i < to; i++)
        {
            var (sine, cosine) = Math.SinCos(2 * Math.PI * frequencyHz * i / rateHz);
            notch.Step([sine], output);
            if (i < from) continue;

            re += output[0] * cosine;
            im += output[0] * sine;
        }

        return 2 * Math.Sqrt((re * re) + (im * im)) / (to - from);
    }
}
