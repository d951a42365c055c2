namespace LiveWave.Dsp;

/// <summary>A bank of templates h in conjugate pairs (cosine − i·sine, cosine + i·sine): k and −k of planar waves, the two senses of a
/// rotation, expanding and contracting. No allocation after the start.</summary>
/// <remarks>
/// With y = C⁻¹z, A = Σ cosine·y and B = Σ sine·y the two numerators of a pair are hᴴC⁻¹z = A ± iB, with one denominator
/// d = cosine′C⁻¹cosine + sine′C⁻¹sine. η = |hᴴC⁻¹z|²/(d·zᴴC⁻¹z) is Beta(1, N − 1) in Gaussian noise of covariance C whatever the
/// frame's amplitude (the normalised matched filter; Kelly 1986). With the prior gain s = d·Σ|z|²/zᴴC⁻¹z
/// <c>Λ = −(N − 1) ln(1 − η) s/(1 + s) − ln(1 + s)</c> is the logarithm of the marginal likelihood ratio.
/// </remarks>
internal sealed class TemplateBank
{
    private readonly int _pairCount;
    private readonly int _channelCount;
    private readonly int _half;                      // padded number of pairs: sines follow cosines
    private readonly PackedMatrix _templates;
    private readonly double[] _whitenedCosine;       // C⁻¹ cosine, pair by pair
    private readonly double[] _whitenedSine;
    private readonly double[] _denominator;
    private readonly double[] _denominatorNow;       // with the missing channels taken out
    private readonly double[] _re;
    private readonly double[] _im;
    private readonly double[] _plus;
    private readonly double[] _minus;
    private int _version;

    /// <summary>Whitens the templates.</summary>
    /// <param name="whitening">The inverse covariance.</param>
    /// <param name="phases">θ of each pair's first template h = exp(−iθ): one row a pair, one value a good channel, radians.</param>
    public TemplateBank(Whitening whitening, double[][] phases)
    {
        _pairCount = phases.Length;
        _channelCount = whitening.ChannelCount;
        _half = PackedMatrix.Padded(_pairCount);
        var cosine = Array.ConvertAll(phases, row => Array.ConvertAll(row, Portable.Cos));
        var sine = Array.ConvertAll(phases, row => Array.ConvertAll(row, Portable.Sin));
        _templates = new PackedMatrix(2 * _half, _channelCount, (row, channel) => row < _half
            ? row < _pairCount ? cosine[row][channel] : 0
            : row - _half < _pairCount ? sine[row - _half][channel] : 0);
        _whitenedCosine = new double[_pairCount * _channelCount];
        _whitenedSine = new double[_pairCount * _channelCount];
        _denominator = new double[_pairCount];
        var (re, im) = (new double[PackedMatrix.Padded(_channelCount)], new double[PackedMatrix.Padded(_channelCount)]);
        for (var pair = 0; pair < _pairCount; pair++)
        {
            whitening.Multiply(cosine[pair], sine[pair], re, im);
            re.AsSpan(0, _channelCount).CopyTo(Row(_whitenedCosine, pair));
            im.AsSpan(0, _channelCount).CopyTo(Row(_whitenedSine, pair));
            _denominator[pair] = Sums.Dot(cosine[pair], Row(_whitenedCosine, pair)) + Sums.Dot(sine[pair], Row(_whitenedSine, pair));
        }

        _denominatorNow = [.. _denominator];
        (_re, _im) = (new double[2 * _half], new double[2 * _half]);
        (_plus, _minus) = (new double[_pairCount], new double[_pairCount]);
    }

    /// <summary>Λ of the first template of each pair (travelling along +k) in the last frame.</summary>
    public ReadOnlySpan<double> Plus => _plus;

    /// <summary>Λ of the second template of each pair.</summary>
    public ReadOnlySpan<double> Minus => _minus;

    /// <summary>The pair that holds the largest Λ, the first of equals.</summary>
    public int Best { get; private set; }

    /// <summary>True if it is the pair's second template.</summary>
    public bool BestIsMinus { get; private set; }

    /// <summary>ln of the mean over both templates of all pairs of exp Λ.</summary>
    public double Evidence { get; private set; }

    /// <summary>Compares a frame with all templates.</summary>
    /// <param name="frame">The frame.</param>
    public void Compare(WhitenedFrame frame)
    {
        if (_version != frame.Missing.Version) Reduce(frame.Missing);
        _templates.Multiply(frame.WhitenedRe, frame.WhitenedIm, _re, _im);
        for (var pair = 0; pair < _pairCount; pair++)
        {
            var (aRe, aIm) = (_re[pair], _im[pair]);
            var (bRe, bIm) = (_re[_half + pair], _im[_half + pair]);
            var likelihood = new Likelihood(frame, _denominatorNow[pair]);
            _plus[pair] = likelihood.Lambda(Square(aRe - bIm, aIm + bRe));
            _minus[pair] = likelihood.Lambda(Square(aRe + bIm, aIm - bRe));
        }

        FindBest();
        var top = BestIsMinus ? _minus[Best] : _plus[Best];
        var sum = 0.0;
        for (var pair = 0; pair < _pairCount; pair++) sum += Portable.Exp(_plus[pair] - top) + Portable.Exp(_minus[pair] - top);
        Evidence = top + Portable.Log(sum / (2 * _pairCount));
    }

    private static double Square(double re, double im) => re * re + im * im;

    private Span<double> Row(double[] matrix, int pair) => matrix.AsSpan(pair * _channelCount, _channelCount);

    private void Reduce(MissingChannels missing)
    {
        for (var pair = 0; pair < _pairCount; pair++)
        {
            _denominatorNow[pair] = _denominator[pair]
                - missing.Reduction(Row(_whitenedCosine, pair)) - missing.Reduction(Row(_whitenedSine, pair));
        }

        _version = missing.Version;
    }

    private void FindBest()
    {
        (Best, BestIsMinus) = (0, _minus[0] > _plus[0]);
        var top = Math.Max(_plus[0], _minus[0]);
        for (var pair = 1; pair < _pairCount; pair++)
        {
            if (_plus[pair] > top) (top, Best, BestIsMinus) = (_plus[pair], pair, false);
            if (_minus[pair] > top) (top, Best, BestIsMinus) = (_minus[pair], pair, true);
        }
    }
}
