namespace LiveWave.Dsp;

/// <summary>What becomes of a low-pass pole when a low-pass turns into a band-pass: two poles.</summary>
internal static class PoleSplit
{
    /// <summary>
    /// A low-pass pole p (already times the width) splits in two band-pass poles, s² − ps + c = 0. Each is returned as (σ, |s|²)
    /// of the quadratic s² + 2σs + |s|² that it forms with its conjugate.
    /// </summary>
    /// <remarks>s = (p ± √(p² − 4c))/2, the larger root first, the other as c/s: no difference of near equals.</remarks>
    /// <param name="damping">−Re p.</param>
    /// <param name="frequency">Im p, at least 0.</param>
    /// <param name="centreSquare">c, the product of the band's edges.</param>
    public static ((double Sigma, double Square) Near, (double Sigma, double Square) Far) Of(
        double damping, double frequency, double centreSquare)
    {
        var (re, im) = (-damping, frequency);
        var (rootRe, rootIm) = SquareRoot((re * re) - (im * im) - (4 * centreSquare), 2 * re * im);
        if ((rootRe * re) + (rootIm * im) < 0) (rootRe, rootIm) = (-rootRe, -rootIm);

        var (farRe, farIm) = ((re + rootRe) / 2, (im + rootIm) / 2);
        var farSquare = (farRe * farRe) + (farIm * farIm);
        var nearRe = centreSquare * farRe / farSquare;
        return ((-nearRe, centreSquare * centreSquare / farSquare), (-farRe, farSquare));
    }

    /// <summary>The complex root with real part of at least 0.</summary>
    private static (double Re, double Im) SquareRoot(double re, double im)
    {
        var length = Portable.Hypot(re, im);
        if (length == 0) return (0, 0);

        var larger = Math.Sqrt((length + Math.Abs(re)) / 2);
        var smaller = Math.Abs(im) / (2 * larger);
        var (rootRe, rootIm) = re >= 0 ? (larger, smaller) : (smaller, larger);
        return (rootRe, im < 0 ? -rootIm : rootIm);
    }
}
