namespace LiveWave.Dsp;

/// <summary>A planar wave h = exp(−ik·x) of one wave vector, held against one frame. No allocation after the start.</summary>
internal sealed class PlaneTemplate
{
    private readonly ArrayGeometry _geometry;
    private readonly double[] _re;
    private readonly double[] _im;
    private readonly double[] _whitenedRe;
    private readonly double[] _whitenedIm;

    /// <summary>Makes room.</summary>
    /// <param name="geometry">The array.</param>
    public PlaneTemplate(ArrayGeometry geometry)
    {
        _geometry = geometry;
        (_re, _im) = (new double[geometry.ChannelCount], new double[geometry.ChannelCount]);
        var padded = PackedMatrix.Padded(geometry.ChannelCount);
        (_whitenedRe, _whitenedIm) = (new double[padded], new double[padded]);
    }

    /// <summary>Wave vector along the array's first coordinate, rad/mm.</summary>
    public double First { get; private set; }

    /// <summary>Wave vector along the second; 0 on a line.</summary>
    public double Second { get; private set; }

    /// <summary>Real parts of h.</summary>
    public ReadOnlySpan<double> Re => _re;

    /// <summary>Imaginary parts of h.</summary>
    public ReadOnlySpan<double> Im => _im;

    /// <summary>Real parts of C⁻¹h.</summary>
    public ReadOnlySpan<double> WhitenedRe => _whitenedRe.AsSpan(0, _re.Length);

    /// <summary>Imaginary parts of C⁻¹h.</summary>
    public ReadOnlySpan<double> WhitenedIm => _whitenedIm.AsSpan(0, _im.Length);

    /// <summary>hᴴC⁻¹h.</summary>
    public double Denominator { get; private set; }

    /// <summary>Real part of hᴴC⁻¹z.</summary>
    public double NumeratorRe { get; private set; }

    /// <summary>Imaginary part of hᴴC⁻¹z.</summary>
    public double NumeratorIm { get; private set; }

    /// <summary>Whitened energy explained, |hᴴC⁻¹z|²/(hᴴC⁻¹h).</summary>
    public double Explained { get; private set; }

    /// <summary>Sets the wave vector.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="first">Along the first coordinate, rad/mm.</param>
    /// <param name="second">Along the second.</param>
    public void Hold(WhitenedFrame frame, double first, double second)
    {
        (First, Second) = (first, second);
        var along = _geometry.Coordinate(0);
        var across = _geometry.Coordinate(_geometry.Rank - 1);
        if (_geometry.Rank == 1) second = 0;
        for (var i = 0; i < _re.Length; i++)
        {
            var (sine, cosine) = Portable.SinCos(first * along[i] + second * across[i]);
            (_re[i], _im[i]) = (cosine, -sine);
        }

        frame.Whiten(_re, _im, _whitenedRe, _whitenedIm);
        Denominator = Sums.Dot(_re, WhitenedRe) + Sums.Dot(_im, WhitenedIm);
        NumeratorRe = Sums.Dot(_re, frame.WhitenedRe) + Sums.Dot(_im, frame.WhitenedIm);
        NumeratorIm = Sums.Dot(_re, frame.WhitenedIm) - Sums.Dot(_im, frame.WhitenedRe);
        Explained = (NumeratorRe * NumeratorRe + NumeratorIm * NumeratorIm) / Denominator;
    }
}
