using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Inverse of the noise's loaded spatial covariance over the good channels. Immutable.</summary>
internal sealed class Whitening
{
    private const double LeastRetry = 1e-6;    // where no loading was asked for and the matrix turns out singular
    private const double MostLoading = 1e6;

    private readonly double[] _inverse;
    private readonly PackedMatrix _packed;

    /// <summary>Inverts once.</summary>
    /// <param name="noise">The covariance; null: independent noise, as strong on every channel.</param>
    /// <param name="channelCount">Number of good channels.</param>
    /// <exception cref="RefusedException">The model was learnt for another number of channels, or holds no variance.</exception>
    public Whitening(NoiseModel? noise, int channelCount)
    {
        ChannelCount = channelCount;
        _inverse = noise is null ? Identity(channelCount) : Inverted(noise, channelCount);
        _packed = new PackedMatrix(channelCount, channelCount, (row, column) => _inverse[row * channelCount + column]);
    }

    /// <summary>Number of good channels.</summary>
    public int ChannelCount { get; }

    /// <summary>Share of the mean variance that was added to the diagonal: the model's own, or ten times it and more until the
    /// matrix could be inverted.</summary>
    public double Loading { get; private set; }

    /// <summary>A row of the inverse; it is symmetric.</summary>
    /// <param name="channel">Number among the good channels.</param>
    public ReadOnlySpan<double> Row(int channel) => _inverse.AsSpan(channel * ChannelCount, ChannelCount);

    /// <summary>Inverse times complex vector. Does not allocate.</summary>
    /// <param name="re">Real parts.</param>
    /// <param name="im">Imaginary parts.</param>
    /// <param name="outRe">Filled, <see cref="PackedMatrix.Padded"/> long.</param>
    /// <param name="outIm">Filled.</param>
    public void Multiply(ReadOnlySpan<double> re, ReadOnlySpan<double> im, Span<double> outRe, Span<double> outIm) =>
        _packed.Multiply(re, im, outRe, outIm);

    private static double[] Identity(int n)
    {
        var identity = new double[n * n];
        for (var i = 0; i < n; i++) identity[i * n + i] = 1;
        return identity;
    }

    private double[] Inverted(NoiseModel noise, int n)
    {
        if (noise.ChannelCount != n)
        {
            throw new RefusedException(
                $"the noise model is over {noise.ChannelCount} channels, the layout has {n} good ones", "calibration",
                "learn a baseline again with this layout");
        }

        var variance = 0.0;
        for (var i = 0; i < n; i++) variance += noise.Covariance[i * n + i];
        variance /= n;
        if (!(variance > 0) || !(noise.Loading >= 0))
        {
            throw new RefusedException("the noise model holds no variance", "calibration", "learn a baseline again");
        }

        for (Loading = noise.Loading; Loading <= MostLoading; Loading = Math.Max(10 * Loading, LeastRetry))
        {
            var factor = noise.Covariance.ToArray();
            for (var i = 0; i < n; i++) factor[i * n + i] += Loading * variance;
            if (Cholesky.TryFactor(factor, n)) return Cholesky.Inverse(factor, n);
        }

        throw new RefusedException("the noise model is not a covariance", "calibration", "learn a baseline again");
    }
}
