namespace LiveWave.Dsp;

/// <summary>How a planar wave's template changes with one component of its wave vector: x_a h, whitened (see
/// <see cref="PlaneFit"/>). No allocation after the start.</summary>
internal sealed class PlaneSlope
{
    private readonly ArrayGeometry _geometry;
    private readonly int _coordinate;
    private readonly double[] _re;
    private readonly double[] _im;
    private readonly double[] _whitenedRe;
    private readonly double[] _whitenedIm;
    private double _gammaRe;      // hᴴC⁻¹(x_a h)/hᴴC⁻¹h
    private double _gammaIm;

    /// <summary>Makes room.</summary>
    /// <param name="geometry">The array.</param>
    /// <param name="coordinate">Along which coordinate.</param>
    public PlaneSlope(ArrayGeometry geometry, int coordinate)
    {
        _geometry = geometry;
        _coordinate = coordinate;
        (_re, _im) = (new double[geometry.ChannelCount], new double[geometry.ChannelCount]);
        var padded = PackedMatrix.Padded(geometry.ChannelCount);
        (_whitenedRe, _whitenedIm) = (new double[padded], new double[padded]);
    }

    /// <summary>Takes a template.</summary>
    /// <param name="frame">The frame it is held against.</param>
    /// <param name="template">The template.</param>
    public void Hold(WhitenedFrame frame, PlaneTemplate template)
    {
        var places = _geometry.Coordinate(_coordinate);
        var re = template.Re;
        var im = template.Im;
        for (var i = 0; i < _re.Length; i++) (_re[i], _im[i]) = (places[i] * re[i], places[i] * im[i]);
        frame.Whiten(_re, _im, _whitenedRe, _whitenedIm);
        _gammaRe = (Sums.Dot(template.WhitenedRe, _re) + Sums.Dot(template.WhitenedIm, _im)) / template.Denominator;
        _gammaIm = (Sums.Dot(template.WhitenedRe, _im) - Sums.Dot(template.WhitenedIm, _re)) / template.Denominator;
    }

    /// <summary>A_ab = Re D_aᴴC⁻¹D_b.</summary>
    /// <param name="other">The slope along b.</param>
    /// <param name="template">The template both were taken from.</param>
    public double Product(PlaneSlope other, PlaneTemplate template)
    {
        var plain = Sums.Dot(_re, other._whitenedRe.AsSpan(0, _re.Length)) + Sums.Dot(_im, other._whitenedIm.AsSpan(0, _im.Length));
        var projected = plain - (_gammaRe * other._gammaRe + _gammaIm * other._gammaIm) * template.Denominator;
        return template.Explained / template.Denominator * projected;     // |α|² = explained / denominator
    }

    /// <summary>g_a = Re D_aᴴC⁻¹(z − αh) = −Im α*((x_a h)ᴴy − γ_a* hᴴy), with y = C⁻¹z.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="template">The template.</param>
    public double Gradient(WhitenedFrame frame, PlaneTemplate template)
    {
        var yRe = frame.WhitenedRe;
        var yIm = frame.WhitenedIm;
        var (numeratorRe, numeratorIm) = (template.NumeratorRe, template.NumeratorIm);
        var re = Sums.Dot(_re, yRe) + Sums.Dot(_im, yIm) - (_gammaRe * numeratorRe + _gammaIm * numeratorIm);
        var im = Sums.Dot(_re, yIm) - Sums.Dot(_im, yRe) - (_gammaRe * numeratorIm - _gammaIm * numeratorRe);
        return (numeratorIm * re - numeratorRe * im) / template.Denominator;
    }
}
