using FsCheck.Xunit;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

/// <summary>Against the C library behind <see cref="Math"/>, which is good to one ulp; the exact reference is in <see cref="PortableGoldenTests"/>.</summary>
public class PortableTests
{
    private const int Allowed = 2;

    [Property(Replay = "2026,1201", MaxTest = 2000)]
    public bool Any_number_gives_what_the_C_library_gives(double x, double y) =>
        Ulps.Between(Portable.Sin(x), Math.Sin(x)) <= Allowed
        && Ulps.Between(Portable.Cos(x), Math.Cos(x)) <= Allowed
        && Ulps.Between(Portable.Tan(x), Math.Tan(x)) <= Allowed
        && Ulps.Between(Portable.Exp(x), Math.Exp(x)) <= Allowed
        && Ulps.Between(Portable.Log(x), Math.Log(x)) <= Allowed
        && Ulps.Between(Portable.Atan2(y, x), Math.Atan2(y, x)) <= Allowed
        && (double.IsNaN(x) || double.IsNaN(y) || Ulps.Between(Portable.Hypot(x, y), double.Hypot(x, y)) <= Allowed);

    [Theory]
    [InlineData(-7, 7)]
    [InlineData(-1e5, 1e5)]
    [InlineData(-1.1e6, 1.1e6)]
    [InlineData(-1e15, 1e15)]
    public void Sine_cosine_and_tangent_hold_over_a_grid(double from, double to)
    {
        var worst = 0L;
        foreach (var x in Grid(from, to))
        {
            worst = Math.Max(worst, Ulps.Between(Portable.Sin(x), Math.Sin(x)));
            worst = Math.Max(worst, Ulps.Between(Portable.Cos(x), Math.Cos(x)));
            worst = Math.Max(worst, Ulps.Between(Portable.Tan(x), Math.Tan(x)));
        }

        Assert.InRange(worst, 0, Allowed);
    }

    [Fact]
    public void Sine_and_cosine_hold_at_every_magnitude()
    {
        var lots = new SplitMix64(5);
        var worst = 0L;
        for (var exponent = -30; exponent < 1024; exponent++)
        {
            for (var i = 0; i < 40; i++)
            {
                var x = Math.ScaleB(lots.NextUniform(1, 2), exponent);
                worst = Math.Max(worst, Ulps.Between(Portable.Sin(x), Math.Sin(x)));
                worst = Math.Max(worst, Ulps.Between(Portable.Cos(x), Math.Cos(x)));
            }
        }

        Assert.InRange(worst, 0, Allowed);
    }

    [Fact]
    public void Beside_each_multiple_of_a_quarter_turn_sine_cosine_and_tangent_keep_their_relative_error()
    {
        var worst = 0L;
        for (var n = 1; n < 65_000; n++)
        {
            var x = n * (Math.PI / 2);
            foreach (var near in (double[])[x, Math.BitIncrement(x), Math.BitDecrement(x)])
            {
                worst = Math.Max(worst, Ulps.Between(Portable.Sin(near), Math.Sin(near)));
                worst = Math.Max(worst, Ulps.Between(Portable.Cos(near), Math.Cos(near)));
                worst = Math.Max(worst, Ulps.Between(Portable.Tan(near), Math.Tan(near)));
            }
        }

        Assert.InRange(worst, 0, Allowed);
    }

    [Fact]
    public void Exponential_and_logarithm_hold_over_a_grid()
    {
        var worst = 0L;
        foreach (var x in Grid(-746, 710)) worst = Math.Max(worst, Ulps.Between(Portable.Exp(x), Math.Exp(x)));
        foreach (var x in Grid(-1, 1)) worst = Math.Max(worst, Ulps.Between(Portable.Exp(x), Math.Exp(x)));
        foreach (var x in Grid(0.3, 3)) worst = Math.Max(worst, Ulps.Between(Portable.Log(x), Math.Log(x)));
        foreach (var x in Grid(-744, 709)) worst = Math.Max(worst, Ulps.Between(Portable.Log(Math.Exp(x)), Math.Log(Math.Exp(x))));

        Assert.InRange(worst, 0, Allowed);
    }

    [Fact]
    public void Arc_tangent_holds_all_round_and_at_any_steepness()
    {
        var worst = 0L;
        foreach (var angle in Grid(-3.2, 3.2))
        {
            var (y, x) = Math.SinCos(angle);
            worst = Math.Max(worst, Ulps.Between(Portable.Atan2(y, x), Math.Atan2(y, x)));
        }

        foreach (var exponent in Grid(-320, 308))
        {
            var y = Math.Pow(10, exponent);
            worst = Math.Max(worst, Ulps.Between(Portable.Atan2(y, 3), Math.Atan2(y, 3)));
            worst = Math.Max(worst, Ulps.Between(Portable.Atan2(y, -y * 0.7), Math.Atan2(y, -y * 0.7)));
        }

        Assert.InRange(worst, 0, Allowed);
    }

    [Property(Replay = "2026,1201", MaxTest = 1000)]
    public bool Odd_functions_are_odd_and_even_ones_even_to_the_last_bit(double x, double y) =>
        Same(Portable.Sin(-x), -Portable.Sin(x))
        && Same(Portable.Tan(-x), -Portable.Tan(x))
        && Same(Portable.Cos(-x), Portable.Cos(x))
        && Same(Portable.Atan2(-y, x), -Portable.Atan2(y, x));

    [Property(Replay = "2026,1201", MaxTest = 1000)]
    public bool Sine_and_cosine_together_are_those_taken_alone(double x) =>
        Same(Portable.SinCos(x).Sin, Portable.Sin(x)) && Same(Portable.SinCos(x).Cos, Portable.Cos(x));

    [Fact]
    public void What_is_not_known_stays_not_known()
    {
        foreach (var f in (Func<double, double>[])[Portable.Sin, Portable.Cos, Portable.Tan, Portable.Exp, Portable.Log])
        {
            Assert.True(double.IsNaN(f(double.NaN)));
        }

        Assert.True(double.IsNaN(Portable.Atan2(double.NaN, 1)) && double.IsNaN(Portable.Atan2(1, double.NaN)));
        Assert.True(double.IsNaN(Portable.Hypot(double.NaN, double.PositiveInfinity)));
        Assert.True(double.IsNaN(Portable.Hypot(1, double.NaN)));
    }

    [Fact]
    public void Edges_are_those_of_the_C_library()
    {
        double[] edges =
        [
            double.PositiveInfinity, 0.0, 5e-324, double.MaxValue, 709.782712893384, 709.7827128933841,
            745.1332191019411, 745.1332191019412, 746,
        ];
        foreach (var x in edges.Concat(edges.Select(edge => -edge)))
        {
            foreach (var y in (double[])[0.0, -0.0, 1, -1, double.PositiveInfinity, double.NegativeInfinity, double.MaxValue, 5e-324])
            {
                Assert.True(Ulps.Between(Portable.Atan2(y, x), Math.Atan2(y, x)) <= Allowed);
                Assert.Equal(double.IsNegative(y), double.IsNegative(Portable.Atan2(y, x)));
                Assert.True(Ulps.Between(Portable.Hypot(y, x), double.Hypot(y, x)) <= Allowed);
            }

            Assert.True(Ulps.Between(Portable.Sin(x), Math.Sin(x)) <= Allowed);
            Assert.True(Ulps.Between(Portable.Cos(x), Math.Cos(x)) <= Allowed);
            Assert.True(Ulps.Between(Portable.Tan(x), Math.Tan(x)) <= Allowed);
            Assert.True(Ulps.Between(Portable.Exp(x), Math.Exp(x)) <= Allowed);
            Assert.True(Ulps.Between(Portable.Log(x), Math.Log(x)) <= Allowed);
        }

        Assert.True(double.IsNegative(Portable.Sin(-0.0)) && double.IsNegative(Portable.Tan(-0.0)));
    }

    [Property(Replay = "2026,1201", MaxTest = 1000)]
    public bool A_length_has_the_very_bits_of_the_plain_formula_in_ordinary_ranges(int x, int y) =>
        Same(Portable.Hypot(x * 0.37, y * 0.11), Math.Sqrt((x * 0.37 * (x * 0.37)) + (y * 0.11 * (y * 0.11))));

    [Fact]
    public void A_hundred_thousand_results_have_the_bits_they_had_on_every_other_machine()
    {
        const ulong BitsEverywhere = 7153206488375490880;
        var lots = new SplitMix64(20260801);
        var hash = 0xCBF29CE484222325;

        for (var i = 0; i < 12_500; i++)
        {
            var angle = lots.NextUniform(-1e5, 1e5);
            var (sine, cosine) = Portable.SinCos(angle * (i % 8 == 0 ? 1e9 : 1));
            var (x, y) = (lots.NextNormal(), lots.NextNormal());
            var power = lots.NextUniform(-740, 700);
            double[] results =
            [
                sine, cosine, Portable.Tan(angle), Portable.Exp(power),
                Portable.Log(Portable.Exp(power)), Portable.Log(Math.Abs(x)), Portable.Atan2(y, x), Portable.Hypot(x, y),
            ];
            foreach (var result in results) hash = (hash ^ BitConverter.DoubleToUInt64Bits(result)) * 0x100000001B3;
        }

        Assert.Equal(BitsEverywhere, hash);
    }

    private static bool Same(double a, double b) =>
        BitConverter.DoubleToInt64Bits(a) == BitConverter.DoubleToInt64Bits(b) || (double.IsNaN(a) && double.IsNaN(b));

    private static IEnumerable<double> Grid(double from, double to)
    {
        const int Steps = 50_000;
        for (var i = 0; i <= Steps; i++) yield return from + ((to - from) * i / Steps);
    }
}
