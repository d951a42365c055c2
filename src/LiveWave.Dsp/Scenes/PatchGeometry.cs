using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Places of a patch's electrodes as scenes need them; any number of electrodes, bad ones too.</summary>
internal sealed class PatchGeometry
{
    /// <summary>Measures a layout.</summary>
    public PatchGeometry(Layout layout)
    {
        XMm = [.. layout.Electrodes.Select(electrode => electrode.XMm)];
        YMm = [.. layout.Electrodes.Select(electrode => electrode.YMm)];
        MeanXMm = Sums.Sum(XMm) / Count;
        MeanYMm = Sums.Sum(YMm) / Count;
        ApertureMm = Math.Max(XMm.Max() - XMm.Min(), YMm.Max() - YMm.Min());
    }

    /// <summary>Positions along x, mm.</summary>
    public double[] XMm { get; }

    /// <summary>Positions along y, mm.</summary>
    public double[] YMm { get; }

    /// <summary>Their mean along x.</summary>
    public double MeanXMm { get; }

    /// <summary>Their mean along y.</summary>
    public double MeanYMm { get; }

    /// <summary>Larger side of the bounding box; 0 for a single electrode.</summary>
    public double ApertureMm { get; }

    /// <summary>Number of electrodes.</summary>
    public int Count => XMm.Length;

    /// <summary>Lower factor of a covariance between the electrodes, row-major.</summary>
    /// <param name="covariance">By distance, mm.</param>
    /// <param name="own">Added on the diagonal.</param>
    /// <exception cref="RefusedException">It is not positive definite.</exception>
    public double[] Factor(Func<double, double> covariance, double own)
    {
        var factor = new double[Count * Count];
        for (var i = 0; i < Count; i++)
        {
            for (var j = 0; j <= i; j++) factor[(i * Count) + j] = covariance(Portable.Hypot(XMm[i] - XMm[j], YMm[i] - YMm[j]));
            factor[(i * Count) + i] += own;
        }

        return Cholesky.TryFactor(factor, Count)
            ? factor
            : throw new RefusedException("two electrodes lie at one place", "the scene's patch", "give each its own place");
    }
}
