using FsCheck.Xunit;

namespace LiveWave.Dsp.Tests;

public class SumsTests
{
    [Property(Replay = "2026,1201", MaxTest = 500)]
    public bool Sums_are_those_of_eight_plain_lanes_to_the_last_bit(double[] a, int cut)
    {
        a = [.. a.Where(double.IsFinite), 0.1, 1e16, -3, 0.7, 1e-9, 2.5, -1e16, 1.25, 0.3];
        var b = a.Select((value, i) => (i * 0.37) - value).ToArray();
        var w = a.Select((_, i) => 1.0 / (i + 3)).ToArray();
        var length = Math.Abs(cut % (a.Length + 1));
        a = a[..length];
        b = b[..length];
        w = w[..length];

        return Same(Sums.Sum(a), InLanes(i => a[i], length))
            && Same(Sums.Dot(a, b), InLanes(i => a[i] * b[i], length))
            && Same(Sums.Dot3(w, a, b), InLanes(i => w[i] * a[i] * b[i], length));
    }

    [Fact]
    public void The_order_is_the_written_one_and_no_other()
    {
        double[] values = [1, 1e16, 1, -1e16, 1, 1e16, 1, -1e16, 1];

        Assert.Equal(5, Sums.Sum(values));
        Assert.Equal(0, Sums.Sum([1e16, 1, 0, 0, 0, 0, -1e16, 0]) - 1);
        Assert.Equal(0, Sums.Sum([1e16, 0, 1, 0, -1e16, 0, 0, 0]) - 1);
        Assert.Equal(0, Sums.Sum([1e16, 0, -1e16, 0, 1, 0, 0, 0]));
    }

    [Fact]
    public void Nothing_adds_up_to_nothing()
    {
        Assert.Equal(0, Sums.Sum([]));
        Assert.Equal(0, Sums.Dot([], []));
    }

    [Theory]
    [InlineData(3)]
    [InlineData(11)]
    public void One_value_not_known_makes_the_sum_not_known(int where)
    {
        var values = new double[12];
        values[where] = double.NaN;

        Assert.True(double.IsNaN(Sums.Sum(values)));
    }

    [Fact]
    public void Unequal_lengths_are_refused()
    {
        Assert.Throws<ArgumentException>(() => Sums.Dot([1, 2], [1]));
        Assert.Throws<ArgumentException>(() => Sums.Dot3([1], [1], [1, 2]));
    }

    private static double InLanes(Func<int, double> term, int length)
    {
        var lane = new double[8];
        for (var i = 0; i < length; i++) lane[i % 8] += term(i);
        return ((lane[0] + lane[4]) + (lane[2] + lane[6])) + ((lane[1] + lane[5]) + (lane[3] + lane[7]));
    }

    private static bool Same(double a, double b) =>
        BitConverter.DoubleToInt64Bits(a) == BitConverter.DoubleToInt64Bits(b) || (double.IsNaN(a) && double.IsNaN(b));
}
