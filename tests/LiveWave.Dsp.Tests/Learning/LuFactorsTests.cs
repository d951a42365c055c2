namespace LiveWave.Dsp.Tests;

public sealed class LuFactorsTests
{
    [Fact]
    public void It_solves_what_it_factorised_even_with_a_zero_on_the_diagonal()
    {
        var matrix = new RealMatrix(3, 3) { [0, 1] = 2, [0, 2] = 1, [1, 0] = 1, [1, 1] = -2, [1, 2] = -3, [2, 0] = -1, [2, 1] = 1, [2, 2] = 2 };
        var wanted = new RealMatrix(3, 2) { [0, 0] = 1, [1, 0] = -2, [2, 0] = 3, [0, 1] = 0.5, [1, 1] = 4, [2, 1] = -1 };

        var solved = new LuFactors(matrix).Solve(matrix * wanted);

        for (var row = 0; row < 3; row++)
        {
            for (var column = 0; column < 2; column++) Assert.Equal(wanted[row, column], solved[row, column], 1e-13);
        }
    }
}
