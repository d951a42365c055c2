namespace LiveWave.Dsp.Tests;

public class ChiSquareTailsTests
{
    [Theory]
    [InlineData(0.3)]
    [InlineData(6)]
    [InlineData(200)]
    public void A_central_law_with_two_degrees_is_exponential(double limit)
    {
        Assert.Equal(1, new ChiSquareTails(2, limit).Beyond(0) / Math.Exp(-limit / 2), 1e-12);
    }

    // Tables of the normal law: 2·(1 − Φ(x)).
    [Theory]
    [InlineData(0.5, 0.61707507745197)]
    [InlineData(1, 0.31731050786291)]
    [InlineData(2, 0.04550026389636)]
    [InlineData(3, 0.00269979606326)]
    [InlineData(5, 5.7330314373605e-07)]
    public void A_central_law_with_one_degree_is_a_squared_normal(double x, double expected)
    {
        Assert.Equal(1, new ChiSquareTails(1, x * x).Beyond(0) / expected, 1e-10);
    }

    // P(|Z + δ| > d) = Φ(δ − d) + Φ(−δ − d); with d = 2, δ = 3: Φ(1) + Φ(−5).
    [Fact]
    public void A_law_off_centre_with_one_degree_is_a_shifted_normal()
    {
        Assert.Equal(0.84134474606854 + 2.8665157186802e-07, new ChiSquareTails(1, 4).Beyond(9), 1e-12);
    }

    // Two degrees by integrating over the second, normal, component with Simpson's rule.
    [Theory]
    [InlineData(4, 9)]
    [InlineData(30, 20)]
    [InlineData(30, 60)]
    public void A_law_off_centre_with_two_degrees_is_the_length_of_a_shifted_normal_pair(double limit, double noncentrality)
    {
        const int Steps = 4000;
        var sum = 0.0;
        for (var i = 0; i <= Steps; i++)
        {
            var y = -9 + 18.0 * i / Steps;
            var left = limit - y * y;
            var beyond = left > 0 ? new ChiSquareTails(1, left).Beyond(noncentrality) : 1;
            sum += (i is 0 or Steps ? 1 : i % 2 == 0 ? 2 : 4) * beyond * Math.Exp(-y * y / 2) / Math.Sqrt(2 * Math.PI);
        }

        Assert.Equal(sum * 18 / Steps / 3, new ChiSquareTails(2, limit).Beyond(noncentrality), 1e-5);
    }
}
