using FsCheck.Xunit;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class SectionFilterTests
{
    private static readonly SecondOrderSections Band = ButterworthDesign.BandPass(2, 8, 12, 1000);

    [Property(Replay = "2026,1201", MaxTest = 60)]
    public bool Every_channel_is_filtered_as_if_it_were_alone(ushort draw)
    {
        var channelCount = (draw % 37) + 1;
        var rows = Signals.Noise(draw, 50, channelCount);
        var filter = new SectionFilter(Band, channelCount);
        var alone = Enumerable.Range(0, channelCount).Select(_ => new SectionFilter(Band, 1)).ToArray();
        var (output, one) = (new double[channelCount], new double[1]);

        foreach (var row in rows)
        {
            filter.Step(row, output);
            for (var channel = 0; channel < channelCount; channel++)
            {
                alone[channel].Step([row[channel]], one);
                if (BitConverter.DoubleToInt64Bits(one[0]) != BitConverter.DoubleToInt64Bits(output[channel])) return false;
            }
        }

        return true;
    }

    [Property(Replay = "2026,1201", MaxTest = 60)]
    public bool Scaling_the_input_by_a_power_of_two_scales_the_output_and_nothing_else(ushort draw)
    {
        var rows = Signals.Noise(draw, 100, 3);
        var (filter, scaled) = (new SectionFilter(Band, 3), new SectionFilter(Band, 3));
        var (a, b) = (new double[3], new double[3]);

        foreach (var row in rows)
        {
            filter.Step(row, a);
            scaled.Step([.. row.Select(value => value * 1024)], b);
            if (!a.Select(value => value * 1024).SequenceEqual(b)) return false;
        }

        return true;
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void A_settled_filter_sees_no_step_in_a_constant(bool isHighPass)
    {
        var design = isHighPass ? ButterworthDesign.HighPass(4, 0.5, 1000) : ButterworthDesign.LowPass(3, 40, 1000);
        double[] offsets = [200, -3e4, 0, 1e-3, 7];
        var filter = new SectionFilter(design, offsets.Length);
        filter.Settle(offsets);

        var output = new double[offsets.Length];
        for (var i = 0; i < 3000; i++)
        {
            filter.Step(offsets, output);
            for (var channel = 0; channel < offsets.Length; channel++)
            {
                var wanted = isHighPass ? 0 : offsets[channel];
                Assert.InRange(output[channel] - wanted, -1e-9 * Math.Abs(offsets[channel]), 1e-9 * Math.Abs(offsets[channel]));
            }
        }
    }

    [Fact]
    public void In_place_is_the_same_as_out_of_place()
    {
        var (apart, inPlace) = (new SectionFilter(Band, 5), new SectionFilter(Band, 5));
        var output = new double[5];

        foreach (var row in Signals.Noise(4, 100, 5))
        {
            apart.Step(row, output);
            inPlace.Step(row, row);
            Assert.Equal(output, row);
        }
    }

    [Fact]
    public void Reset_is_as_new_even_after_a_value_that_is_not_known()
    {
        var filter = new SectionFilter(Band, 2);
        var (again, first) = (new double[2], new double[2]);
        filter.Step([double.NaN, 1], again);
        filter.Reset();
        filter.Step([1, 2], again);

        new SectionFilter(Band, 2).Step([1, 2], first);

        Assert.Equal(first, again);
    }

    [Fact]
    public void After_an_input_fell_silent_the_output_ends_at_exactly_zero()
    {
        var filter = new SectionFilter(ButterworthDesign.BandPass(2, 8, 12, 1000), 3);
        var output = new double[3];
        filter.Step([1, -5, 1e3], output);

        for (var i = 0; i < 100_000; i++) filter.Step([0, 0, 0], output);

        Assert.Equal([0, 0, 0], output);
    }

    [Fact]
    public void Stepping_allocates_nothing()
    {
        var filter = new SectionFilter(Band, 13);
        var (row, output) = (new double[13], new double[13]);
        filter.Step(row, output);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 5000; i++) filter.Step(row, output);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Fact]
    public void A_row_too_short_is_refused()
    {
        var filter = new SectionFilter(Band, 4);

        Assert.Throws<ArgumentOutOfRangeException>(() => filter.Step(new double[3], new double[4]));
        Assert.Throws<ArgumentOutOfRangeException>(() => filter.Step(new double[4], new double[3]));
        Assert.Throws<ArgumentOutOfRangeException>(() => filter.Settle(4, 1));
    }
}
