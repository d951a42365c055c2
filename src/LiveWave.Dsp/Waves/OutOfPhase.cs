namespace LiveWave.Dsp;

/// <summary>The quadrature test: does a frame hold anything that no field in phase can hold?</summary>
/// <remarks>
/// A synchronous field seen through tissue is a real pattern times one phase; its projections on any two real patterns have the same
/// phase or opposite ones. A travelling wave has cosine and sine a quarter cycle apart. With b1, b2 the frame's projections on the
/// whitened, orthonormalised cosine and sine of a template: x = Im(b1*·b2), E = |b1|² + |b2|², m = (E − √(E² − 4x²))/2,
/// <c>Lq = (N − 2) ln(1 + m/(zᴴC⁻¹z − E))</c>. That x is blind to zero-lag mixing: Nolte et al. (2004).
/// </remarks>
internal static class OutOfPhase
{
    private const double LeastIndependence = 1e-9;     // of cosine and sine: below it (k near 0) there is no second pattern

    /// <summary>Lq for a planar template held against a frame.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="template">The template h = cosine − i·sine.</param>
    public static double Gain(WhitenedFrame frame, PlaneTemplate template)
    {
        var (x, energy) = Parts(frame, template);
        var small = 0.5 * (energy - Math.Sqrt(Math.Max(energy * energy - 4 * x * x, 0)));
        return (frame.ObservedCount - 2) * Portable.Log(1 + small / Math.Max(frame.Energy - energy, 1e-300));
    }

    /// <summary>x and E.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="template">The template.</param>
    internal static (double X, double Energy) Parts(WhitenedFrame frame, PlaneTemplate template)
    {
        // cosine = Re h, sine = −Im h; likewise whitened.
        var a11 = Sums.Dot(template.Re, template.WhitenedRe);
        var a12 = -Sums.Dot(template.Re, template.WhitenedIm);
        var a22 = Sums.Dot(template.Im, template.WhitenedIm);
        var (uRe, uIm) = (Sums.Dot(template.Re, frame.WhitenedRe), Sums.Dot(template.Re, frame.WhitenedIm));
        var (vRe, vIm) = (-Sums.Dot(template.Im, frame.WhitenedRe), -Sums.Dot(template.Im, frame.WhitenedIm));
        var determinant = Math.Max(a11 * a22 - a12 * a12, LeastIndependence * a11 * a22 + 1e-300);
        var (norm1, norm2) = (Math.Sqrt(a11), Math.Sqrt(determinant / a11));
        var (b1Re, b1Im) = (uRe / norm1, uIm / norm1);
        var (b2Re, b2Im) = ((vRe - a12 / a11 * uRe) / norm2, (vIm - a12 / a11 * uIm) / norm2);
        return (b1Re * b2Im - b1Im * b2Re, b1Re * b1Re + b1Im * b1Im + b2Re * b2Re + b2Im * b2Im);
    }
}
