using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Testing;

/// <summary>What every conditioner keeps, a plug-in's too: inherit and say how one is made.</summary>
public abstract class ConditionerLaws
{
    /// <summary>Channels of the test stream; odd, so that vectors have a remainder.</summary>
    protected const int ChannelCount = 11;

    private const int RowCount = 3000;

    private int _outputCount;

    /// <summary>Rate of the test stream.</summary>
    protected virtual double RateHz => 1000;

    /// <summary>Frequencies at which the declared delay is measured, between 2 Hz and 0.4 of the output rate, away from what is removed.</summary>
    protected virtual IReadOnlyList<double> DelayProbesHz => [6, 18, 40];

    /// <summary>Whether channels may go into one another, as with a common reference: then a missing one may touch the others' values.</summary>
    protected virtual bool MixesChannels => false;

    /// <summary>A new conditioner, not prepared.</summary>
    protected abstract IConditioner Create();

    [Fact]
    public void What_came_out_does_not_depend_on_what_comes_later()
    {
        var common = Signals.Recording(1, RateHz, RowCount / 2, ChannelCount);
        var (quiet, loud) = (new double[RowCount / 2][], new double[RowCount / 2][]);
        for (var i = 0; i < quiet.Length; i++) (quiet[i], loud[i]) = (new double[ChannelCount], [.. common[i].Select(v => 1e5 * v)]);

        var first = Run(Prepared(), [.. common, .. quiet]).Take(CountOf(common)).ToArray();
        var second = Run(Prepared(), [.. common, .. loud]).Take(CountOf(common)).ToArray();

        AssertSameBits(first, second);
    }

    [Fact]
    public void The_row_given_may_be_reused_by_the_caller_at_once()
    {
        var rows = Signals.Recording(2, RateHz, RowCount, ChannelCount);

        AssertSameBits(Run(Prepared(), rows), Run(Prepared(), rows, fillAfterStep: double.NaN));
    }

    [Fact]
    public void Reset_is_as_new()
    {
        var rows = Signals.Recording(3, RateHz, RowCount, ChannelCount);
        var conditioner = Prepared();
        Run(conditioner, WithMissing(Signals.Noise(4, RowCount / 2 + 1, ChannelCount), 3, 100, 160));

        conditioner.Reset();

        AssertSameBits(Run(Prepared(), rows), Run(conditioner, rows));
    }

    [Fact]
    public void Nothing_is_allocated_after_Prepare()
    {
        var rows = WithMissing(Signals.Recording(5, RateHz, RowCount, ChannelCount), 3, 1000, 1100);
        var conditioner = Prepared();
        var output = new double[_outputCount];
        foreach (var row in rows) conditioner.Step(row, output);

        var before = GC.GetAllocatedBytesForCurrentThread();
        foreach (var row in rows) conditioner.Step(row, output);
        conditioner.Reset();
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }

    [Fact]
    public void Finite_in_finite_out()
    {
        var rows = Signals.Recording(6, RateHz, RowCount, ChannelCount);
        for (var i = RowCount / 2; i < RowCount; i++) rows[i].AsSpan().Fill(i % 2 == 0 ? 1e9 : 0);

        Assert.All(Run(Prepared(), rows), row => Assert.All(row, value => Assert.True(double.IsFinite(value))));
    }

    [Fact]
    public void A_missing_value_stays_in_its_channel_and_is_over_when_it_is_over()
    {
        const int Channel = 3;
        var whole = Signals.Recording(7, RateHz, RowCount, ChannelCount);
        var holed = WithMissing(Signals.Recording(7, RateHz, RowCount, ChannelCount), Channel, 1000, 1100);

        var expected = Run(Prepared(), whole);
        var actual = Run(Prepared(), holed);

        Assert.Equal(expected.Length, actual.Length);
        Assert.Contains(actual, row => double.IsNaN(row[Channel]));
        Assert.True(double.IsFinite(actual[^1][Channel]));
        for (var i = 0; i < actual.Length; i++)
        {
            for (var channel = 0; channel < actual[i].Length; channel++)
            {
                if (channel == Channel) continue;
                if (MixesChannels) Assert.True(double.IsFinite(actual[i][channel]));
                else AssertSameBits(expected[i][channel], actual[i][channel]);
            }
        }
    }

    [Fact]
    public void The_declared_delay_is_the_measured_one()
    {
        const double ApartHz = 0.05;
        foreach (var probeHz in DelayProbesHz)
        {
            var conditioner = Prepared();

            var declared = conditioner.DelaySeconds(probeHz);
            var turned = Phase(probeHz + ApartHz) - Phase(probeHz - ApartHz);
            var measured = -Math.IEEERemainder(turned, 2 * Math.PI) / (2 * Math.PI * 2 * ApartHz);

            Assert.True(
                Math.Abs(measured - declared) <= 2e-6 + (1e-3 * Math.Abs(declared)),
                $"at {probeHz} Hz declared {declared * 1000:f4} ms, measured {measured * 1000:f4} ms");
        }
    }

    /// <summary>Phase of the output against the input's, for a cosine, after five seconds, over eight under a Hann window.</summary>
    private double Phase(double frequencyHz)
    {
        var (settling, rowCount) = ((int)(5 * RateHz), (int)(13 * RateHz));
        var conditioner = Prepared();
        var (output, re, im) = (new double[_outputCount], 0.0, 0.0);
        var rows = Signals.Cosine(frequencyHz, RateHz, rowCount, ChannelCount);
        for (var i = 0; i < rowCount; i++)
        {
            if (!conditioner.Step(rows[i], output) || i < settling) continue;

            // A decimated row stands at the last received row in it.
            var window = 1 - Portable.Cos(2 * Math.PI * (i - settling) / (rowCount - settling));
            var (sine, cosine) = Portable.SinCos(2 * Math.PI * frequencyHz * i / RateHz);
            re += window * output[0] * cosine;
            im -= window * output[0] * sine;
        }

        return Portable.Atan2(im, re);
    }

    private IConditioner Prepared()
    {
        var conditioner = Create();
        _outputCount = conditioner.Prepare(Signals.Format(RateHz, ChannelCount)).ChannelCount;
        return conditioner;
    }

    private int CountOf(double[][] rows) => Run(Prepared(), rows).Length;

    private double[][] Run(IConditioner conditioner, double[][] rows, double? fillAfterStep = null)
    {
        var (given, output, all) = (new double[ChannelCount], new double[_outputCount], new List<double[]>());
        foreach (var row in rows)
        {
            row.CopyTo(given, 0);
            if (conditioner.Step(given, output)) all.Add([.. output]);
            if (fillAfterStep is { } value) given.AsSpan().Fill(value);
        }

        return [.. all];
    }

    private static double[][] WithMissing(double[][] rows, int channel, int from, int to)
    {
        for (var i = from; i < to; i++) rows[i][channel] = double.NaN;
        return rows;
    }

    private static void AssertSameBits(double[][] expected, double[][] actual)
    {
        Assert.NotEmpty(expected);
        Assert.Equal(expected.Length, actual.Length);
        for (var i = 0; i < expected.Length; i++)
        {
            for (var channel = 0; channel < expected[i].Length; channel++) AssertSameBits(expected[i][channel], actual[i][channel]);
        }
    }

    private static void AssertSameBits(double expected, double actual) =>
        Assert.Equal(BitConverter.DoubleToInt64Bits(expected), BitConverter.DoubleToInt64Bits(actual));
}
