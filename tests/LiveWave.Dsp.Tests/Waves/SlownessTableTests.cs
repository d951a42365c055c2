namespace LiveWave.Dsp.Tests;

public class SlownessTableTests
{
    public static IEnumerable<TheoryDataRow<int>> Cases() =>
        Enumerable.Range(0, WaveGolden.Root.GetProperty("slowness").GetArrayLength()).Select(i => new TheoryDataRow<int>(i));

    // By scipy's non-central chi-square and root finder; acceptance line 19 of our wave study, section 6c.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Factors_are_those_of_the_study_to_a_millionth(int number)
    {
        var expected = WaveGolden.Root.GetProperty("slowness")[number];
        var factors = expected.Numbers("factors");

        var (low, middle, high) = new SlownessTable(expected.Number("gate"), 2).Factors(expected.Number("dL"));

        Assert.Equal(factors[0], low, 1e-6);
        Assert.Equal(factors[1], middle, 1e-6);
        Assert.Equal(factors[2], high, 1e-6);
    }

    // The tabled lengths put back into the law, between the nodes and near the place where they leave 0.
    [Theory]
    [InlineData(6, 2)]
    [InlineData(0.5, 2)]
    [InlineData(50, 2)]
    [InlineData(6, 1)]
    [InlineData(20, 1)]
    public void Lengths_solve_the_equation_they_stand_for(double gate, int rank)
    {
        var table = new SlownessTable(gate, rank);
        var gateTails = new ChiSquareTails(rank, 2 * gate);

        for (var gain = gate + 0.01; gain < 7000; gain = gate + (gain - gate) * 1.37)
        {
            var d = Math.Sqrt(2 * gain);
            var tails = new ChiSquareTails(rank, d * d);
            var (low, middle, high) = table.Factors(gain);
            AssertSolves(low, 0.05);
            AssertSolves(middle, 0.5);
            AssertSolves(high, 0.95);

            void AssertSolves(double factor, double probability)
            {
                double Ratio(double f) => tails.Beyond(f * f * d * d) / gateTails.Beyond(f * f * d * d);
                Assert.True(Ratio(factor + 1e-6) >= probability, $"{probability} at {gain}: {factor} is too small");
                if (factor > 1e-6) Assert.True(Ratio(factor - 1e-6) <= probability, $"{probability} at {gain}: {factor} is too large");
            }
        }
    }

    [Theory]
    [InlineData(2)]
    [InlineData(1)]
    public void The_interval_holds_its_middle_and_may_reach_infinite_speed_near_the_gate(int rank)
    {
        var table = new SlownessTable(6, rank);

        for (var gain = 6.0; gain < 500; gain *= 1.05)
        {
            var (low, middle, high) = table.Factors(gain);
            Assert.True(0 <= low && low <= middle && middle <= high, $"{gain}: {low}, {middle}, {high}");
        }

        Assert.Equal(0, table.Factors(6.2).Low);
        Assert.True(table.Factors(30).Low > 0.7);
    }
}
