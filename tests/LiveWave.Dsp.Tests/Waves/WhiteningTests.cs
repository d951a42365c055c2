using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class WhiteningTests
{
    [Fact]
    public void The_inverse_times_the_loaded_covariance_is_the_identity()
    {
        const int N = 20;
        var noise = new NoiseModel([.. Enumerable.Range(0, N * N).Select(i => Math.Exp(-0.3 * Math.Abs(i / N - i % N)))], 0.02, "fitted", 0);

        var whitening = new Whitening(noise, N);

        Assert.Equal(0.02, whitening.Loading);
        for (var row = 0; row < N; row++)
        {
            for (var column = 0; column < N; column++)
            {
                var product = 0.0;
                for (var j = 0; j < N; j++) product += whitening.Row(row)[j] * (noise.Covariance[j * N + column] + (j == column ? 0.02 : 0));
                Assert.Equal(row == column ? 1 : 0, product, 1e-12);
            }
        }
    }

    [Fact]
    public void A_product_adds_up_rows_times_vector()
    {
        const int N = 37;
        var noise = new NoiseModel([.. Enumerable.Range(0, N * N).Select(i => Math.Exp(-0.3 * Math.Abs(i / N - i % N)))], 0.02, "fitted", 0);
        var whitening = new Whitening(noise, N);
        var re = Enumerable.Range(0, N).Select(i => Math.Cos(i)).ToArray();
        var im = Enumerable.Range(0, N).Select(i => Math.Sin(3.0 * i)).ToArray();
        var (outRe, outIm) = (new double[PackedMatrix.Padded(N)], new double[PackedMatrix.Padded(N)]);

        whitening.Multiply(re, im, outRe, outIm);

        for (var row = 0; row < N; row++)
        {
            Assert.Equal(Sums.Dot(whitening.Row(row), re), outRe[row], 1e-12);
            Assert.Equal(Sums.Dot(whitening.Row(row), im), outIm[row], 1e-12);
        }

        Assert.All(outRe[N..], value => Assert.Equal(0, value));
    }

    [Fact]
    public void Without_a_noise_model_nothing_is_whitened()
    {
        var whitening = new Whitening(null, 9);

        for (var i = 0; i < 9; i++) Assert.Equal(Enumerable.Range(0, 9).Select(j => i == j ? 1.0 : 0), whitening.Row(i).ToArray());
    }

    [Fact]
    public void Loading_is_raised_tenfold_until_the_matrix_can_be_inverted()
    {
        // Eigenvalues 2.5 and −0.5: 0.02 and 0.2 are not enough.
        double[] covariance = [1, 1.5, 1.5, 1];

        var whitening = new Whitening(new NoiseModel(covariance, 0.02, "empirical", 0), 2);

        Assert.Equal(2, whitening.Loading, 1e-12);
    }

    [Fact]
    public void A_model_for_another_number_of_channels_is_refused()
    {
        Assert.Throws<RefusedException>(() => new Whitening(new NoiseModel([1, 0, 0, 1], 0.01, "fitted", 0), 3));
    }

    [Fact]
    public void A_model_without_variance_is_refused()
    {
        Assert.Throws<RefusedException>(() => new Whitening(new NoiseModel([0, 0, 0, 0], 0.01, "fitted", 0), 2));
    }
}
