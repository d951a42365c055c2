using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class DecimatorTests
{
    [Fact]
    public void Every_n_th_row_comes_out_and_Reset_starts_the_count_anew()
    {
        var decimator = new Decimator(250);
        var format = decimator.Prepare(Signals.Format(1000, 2));
        var output = new double[2];

        var cameOut = Enumerable.Range(0, 10).Select(_ => decimator.Step([1, 2], output)).ToArray();
        decimator.Reset();
        var afterReset = Enumerable.Range(0, 4).Select(_ => decimator.Step([1, 2], output)).ToArray();

        Assert.Equal(250, format.NominalRateHz);
        Assert.Equal([false, false, false, true, false, false, false, true, false, false], cameOut);
        Assert.Equal([false, false, false, true], afterReset);
    }

    [Theory]
    [InlineData(1000, 500)]
    [InlineData(1000, 250)]
    [InlineData(30000, 1000)]
    [InlineData(24414.0625, 976.5625)]
    public void What_would_fold_into_the_lower_four_tenths_is_60_dB_down_and_bands_below_a_third_stay(double rateHz, double analysisRateHz)
    {
        foreach (var share in (double[])[0.01, 0.1, 0.2, 0.3, 0.33])
        {
            Assert.InRange(AmplitudeLeft(share * analysisRateHz, rateHz, analysisRateHz), 0.988, 1.0001);
        }

        foreach (var share in (double[])[0.6, 0.65, 0.8, 0.99, 1.3])
        {
            if (share * analysisRateHz < rateHz / 2) Assert.InRange(AmplitudeLeft(share * analysisRateHz, rateHz, analysisRateHz), 0, 1.001e-3);
        }
    }

    [Theory]
    [InlineData(5, 1.493)]
    [InlineData(20, 1.496)]
    [InlineData(80, 1.532)]
    public void The_delay_from_30_kHz_to_1_kHz_is_one_and_a_half_ms(double frequencyHz, double delayMs)
    {
        var decimator = new Decimator(1000);
        decimator.Prepare(Signals.Format(30_000, 1));

        Assert.Equal(delayMs, 1000 * decimator.DelaySeconds(frequencyHz), 5e-4);      // SciPy 1.10.1, cheby2(8, 60, 600), phase slope
    }

    [Fact]
    public void The_first_row_makes_no_step()
    {
        var decimator = new Decimator(1000);
        decimator.Prepare(Signals.Format(30_000, 2));
        var output = new double[2];

        for (var i = 0; i < 3000; i++)
        {
            if (!decimator.Step([4000, -70], output)) continue;
            Assert.Equal(4000, output[0], 1e-6);
            Assert.Equal(-70, output[1], 1e-7);
        }
    }

    [Fact]
    public void A_row_is_missing_where_more_than_half_of_its_values_are_and_what_is_missing_is_held()
    {
        var (gap, held) = (new Decimator(250), new Decimator(250));
        gap.Prepare(Signals.Format(1000, 1));
        held.Prepare(Signals.Format(1000, 1));
        var rows = Signals.Noise(3, 40, 1);
        int[] missing = [9, 12, 13, 16, 18, 19, 20, 21, 22, 23, 27];
        var (a, b, last) = (new double[1], new double[1], 0.0);
        var isMissing = new List<bool>();

        for (var i = 0; i < rows.Length; i++)
        {
            var isGap = missing.Contains(i);
            if (!isGap) last = rows[i][0];
            var cameOut = gap.Step(isGap ? [i % 2 == 0 ? double.NaN : double.NegativeInfinity] : rows[i], a);
            held.Step([last], b);
            if (!cameOut) continue;

            isMissing.Add(double.IsNaN(a[0]));
            if (!double.IsNaN(a[0])) Assert.Equal(b[0], a[0]);
        }

        Assert.Equal([false, false, false, false, true, true, false, false, false, false], isMissing);
    }

    [Theory]
    [InlineData(1000, 400, "analysisRateHz is 400: it does not divide the stream's rate (1000 Hz); give 500 or 333.3333333333333, or another that does")]
    [InlineData(1000, 600, "analysisRateHz is 600: it does not divide the stream's rate (1000 Hz); give 500, or a lower one that does")]
    [InlineData(1000, 1000, "analysisRateHz is 1000: it is not below the stream's rate (1000 Hz); leave it out, or lower it")]
    [InlineData(1000, 2000, "analysisRateHz is 2000: it is not below the stream's rate (1000 Hz); leave it out, or lower it")]
    public void A_rate_that_does_not_divide_the_stream_s_is_refused(double rateHz, double analysisRateHz, string message) =>
        Assert.Equal(message, Assert.Throws<RefusedException>(() => new Decimator(analysisRateHz).Prepare(Signals.Format(rateHz, 1))).Message);

    [Fact]
    public void What_makes_no_sense_is_refused_at_once()
    {
        Assert.Equal("analysisRateHz 0 is not a finite number above 0 Hz", Assert.Throws<RefusedException>(() => new Decimator(0)).What);
        Assert.Throws<InvalidOperationException>(() => new Decimator(500).DelaySeconds(10));
    }

    /// <summary>Amplitude that is left of a cosine of amplitude 1, wherever it folds to: √2 times the root mean square, after settling.</summary>
    private static double AmplitudeLeft(double frequencyHz, double rateHz, double analysisRateHz)
    {
        var decimator = new Decimator(analysisRateHz);
        decimator.Prepare(Signals.Format(rateHz, 2));
        var (output, power, count) = (new double[2], 0.0, 0);
        var (from, to) = ((int)(100 / analysisRateHz * rateHz), (int)(1100 / analysisRateHz * rateHz));
        for (var i = 0; i < to; i++)
        {
            var (sine, cosine) = Math.SinCos(2 * Math.PI * frequencyHz * i / rateHz);
            if (!decimator.Step([cosine, sine], output) || i < from) continue;

            power += (output[0] * output[0]) + (output[1] * output[1]);     // cosine and sine together: the same at any phase
            count++;
        }

        return Math.Sqrt(power / count);
    }
}
