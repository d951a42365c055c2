using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>One frame over the good channels: scaled, whitened, with what is missing taken out. No allocation after the start.</summary>
internal sealed class WhitenedFrame
{
    private const double MostMissing = 0.2;

    private readonly int[] _channels;
    private readonly double[] _scale;
    private readonly Whitening _whitening;
    private readonly MissingChannels _missing;
    private readonly bool[] _isMissing;
    private readonly double[] _re;
    private readonly double[] _im;
    private readonly double[] _whitenedRe;
    private readonly double[] _whitenedIm;
    private readonly double[] _unitRe;
    private readonly double[] _unitIm;
    private double _squareRe;      // Σz²
    private double _squareIm;

    /// <summary>Makes room.</summary>
    /// <param name="channels">The good channels' numbers within the patch.</param>
    /// <param name="scale">One a good channel: multiplies its phasor.</param>
    /// <param name="whitening">The inverse covariance of the noise, over the good channels.</param>
    public WhitenedFrame(int[] channels, double[] scale, Whitening whitening)
    {
        _channels = channels;
        _scale = scale;
        _whitening = whitening;
        _missing = new MissingChannels(whitening, Math.Max(1, (int)(MostMissing * channels.Length)));
        _isMissing = new bool[channels.Length];
        (_re, _im) = (new double[channels.Length], new double[channels.Length]);
        (_unitRe, _unitIm) = (new double[channels.Length], new double[channels.Length]);
        var padded = PackedMatrix.Padded(channels.Length);
        (_whitenedRe, _whitenedIm) = (new double[padded], new double[padded]);
    }

    /// <summary>Real parts z, scaled; 0 where missing.</summary>
    public ReadOnlySpan<double> Re => _re;

    /// <summary>Imaginary parts.</summary>
    public ReadOnlySpan<double> Im => _im;

    /// <summary>Real parts of y = C⁻¹z with the missing channels taken out (0 there).</summary>
    public ReadOnlySpan<double> WhitenedRe => _whitenedRe.AsSpan(0, _re.Length);

    /// <summary>Imaginary parts of y.</summary>
    public ReadOnlySpan<double> WhitenedIm => _whitenedIm.AsSpan(0, _im.Length);

    /// <summary>True for the good channels that are missing.</summary>
    public ReadOnlySpan<bool> IsMissing => _isMissing;

    /// <summary>The missing channels.</summary>
    public MissingChannels Missing => _missing;

    /// <summary>Number of channels observed.</summary>
    public int ObservedCount { get; private set; }

    /// <summary>Share of the good channels observed.</summary>
    public double ObservedShare => (double)ObservedCount / _re.Length;

    /// <summary>Σ|z|² over the channels observed.</summary>
    public double Power { get; private set; }

    /// <summary>zᴴC⁻¹z over the channels observed.</summary>
    public double Energy { get; private set; }

    /// <summary>|Σz²|/Σ|z|²: 1 for any real pattern times one phase.</summary>
    public double StandingShare { get; private set; }

    /// <summary>Squared resultant of the phases: 1 where all are equal.</summary>
    public double UniformShare { get; private set; }

    /// <summary>Takes a frame. A channel that was not observed, has no amplitude or is not a number is missing.</summary>
    /// <param name="now">Of the whole patch.</param>
    /// <returns>False if more than a fifth of the good channels are missing, or there is no power: only <see cref="Re"/>,
    /// <see cref="Im"/>, <see cref="IsMissing"/> and the observed share are known then.</returns>
    public bool Take(Phasors now)
    {
        var re = now.Re;
        var im = now.Im;
        var validity = now.Validity;
        ObservedCount = 0;
        for (var i = 0; i < _channels.Length; i++)
        {
            var channel = _channels[i];
            var (a, b) = (re[channel] * _scale[i], im[channel] * _scale[i]);
            var squared = a * a + b * b;
            var isThere = validity[channel] == Validity.Observed && squared > 0 && double.IsFinite(squared);
            _isMissing[i] = !isThere;
            (_re[i], _im[i]) = isThere ? (a, b) : (0, 0);
            var modulus = Math.Sqrt(squared);
            (_unitRe[i], _unitIm[i]) = isThere ? (a / modulus, b / modulus) : (0, 0);
            if (isThere) ObservedCount++;
        }

        var missing = _channels.Length - ObservedCount;
        if (ObservedCount == 0 || missing > MostMissing * _channels.Length) return false;
        _missing.Set(_isMissing, missing);
        Measure();
        return double.IsFinite(Power) && double.IsFinite(Energy) && Energy > 0;
    }

    /// <summary>C⁻¹v with the missing channels taken out (0 there).</summary>
    /// <param name="re">Real parts, one a good channel; what stands at missing ones does not matter.</param>
    /// <param name="im">Imaginary parts.</param>
    /// <param name="outRe">Filled, <see cref="PackedMatrix.Padded"/> long.</param>
    /// <param name="outIm">Filled.</param>
    public void Whiten(ReadOnlySpan<double> re, ReadOnlySpan<double> im, Span<double> outRe, Span<double> outIm)
    {
        _whitening.Multiply(re, im, outRe, outIm);
        _missing.Correct(outRe, outIm);
    }

    /// <summary>Share of the in-phase energy that has the rarer sign once the frame is turned to its most real phase: 0 where
    /// the field has one sign all over, towards 0.5 where half of it swings against the other half.</summary>
    public double OppositeShare()
    {
        var length = Portable.Hypot(_squareRe, _squareIm);
        if (!(length > 0)) return 0;
        // The most real phase is half the angle of Σz²: cosine and sine by the half-angle formulas.
        var cosine = Math.Sqrt(Math.Max(0, 0.5 * (1 + _squareRe / length)));
        var sine = Math.Sqrt(Math.Max(0, 0.5 * (1 - _squareRe / length)));
        if (_squareIm < 0) sine = -sine;
        var (plus, minus) = (0.0, 0.0);
        for (var i = 0; i < _re.Length; i++)
        {
            var swing = _re[i] * cosine + _im[i] * sine;
            if (swing > 0) plus += swing * swing;
            else minus += swing * swing;
        }

        return Math.Min(plus, minus) / (plus + minus);
    }

    private void Measure()
    {
        var (reRe, imIm) = (Sums.Dot(_re, _re), Sums.Dot(_im, _im));
        Power = reRe + imIm;
        (_squareRe, _squareIm) = (reRe - imIm, 2 * Sums.Dot(_re, _im));
        StandingShare = Portable.Hypot(_squareRe, _squareIm) / Power;
        var (meanRe, meanIm) = (Sums.Sum(_unitRe) / ObservedCount, Sums.Sum(_unitIm) / ObservedCount);
        UniformShare = meanRe * meanRe + meanIm * meanIm;
        Whiten(_re, _im, _whitenedRe, _whitenedIm);
        Energy = Sums.Dot(_re, WhitenedRe) + Sums.Dot(_im, WhitenedIm);
    }
}
