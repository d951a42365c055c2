namespace LiveWave.Abstractions;

/// <summary>The complex analytic values of all channels of a patch at one instant. Phase 0 = peak, ±180° = trough.</summary>
/// <remarks>Components in separate arrays, channel order. One writer, the phase estimator; valid until its next step.</remarks>
public sealed class Phasors
{
    private readonly double[] _re;
    private readonly double[] _im;
    private readonly double[] _variance;
    private readonly Validity[] _validity;

    /// <summary>All invalid, all zero.</summary>
    /// <param name="channelCount">At least 1.</param>
    public Phasors(int channelCount)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(channelCount, 1);
        ChannelCount = channelCount;
        _re = new double[RowLength.Padded(channelCount)];
        _im = new double[_re.Length];
        _variance = new double[_re.Length];
        _validity = new Validity[_re.Length];
        _variance.AsSpan().Fill(double.NaN);
    }

    /// <summary>Number of channels.</summary>
    public int ChannelCount { get; }

    /// <summary>The row; set by the host before each step, its index counted in rows of the analysis rate. For a prediction: the
    /// row from which it was made.</summary>
    public RowInstant At { get; set; }

    /// <summary>Real parts: the rhythm's share of each channel's value, in the channel's unit.</summary>
    public Span<double> Re => _re.AsSpan(0, ChannelCount);

    /// <summary>Imaginary parts, a quarter cycle behind; in the channel's unit.</summary>
    public Span<double> Im => _im.AsSpan(0, ChannelCount);

    /// <summary>Posterior variance per axis (of the real, and of the imaginary part), unit squared; NaN where not known.</summary>
    public Span<double> VariancePerAxis => _variance.AsSpan(0, ChannelCount);

    /// <summary>What each phasor rests on.</summary>
    public Span<Validity> Validity => _validity.AsSpan(0, ChannelCount);
}
