namespace LiveWave.Dsp;

/// <summary>
/// Our own elementary functions: the same bits on every machine, vector width and JIT tier, since only + − × ÷ √,
/// comparisons, rounding and bit operations are used. Whatever lies on the way to a decision, filter design too, uses these.
/// </summary>
/// <remarks>
/// At most 2 ulp from the exact value, each over the range its entry names; NaN gives NaN. Odd functions are odd and even ones
/// even to the last bit. Nothing allocates. Methods: argument reduction after Cody and Waite (1980) and Payne and Hanek (1983),
/// kernels as Taylor series long enough that what is cut off lies below a tenth of an ulp.
/// </remarks>
public static class Portable
{
    /// <summary>Sine of an angle in radians, any finite angle.</summary>
    /// <param name="x">Radians; infinite gives NaN.</param>
    public static double Sin(double x) => Trigonometry.Sine(x);

    /// <summary>Cosine of an angle in radians, any finite angle.</summary>
    /// <param name="x">Radians; infinite gives NaN.</param>
    public static double Cos(double x) => Trigonometry.Cosine(x);

    /// <summary>Sine and cosine together: the same bits as <see cref="Sin"/> and <see cref="Cos"/>, one reduction.</summary>
    /// <param name="x">Radians; infinite gives NaN for both.</param>
    public static (double Sin, double Cos) SinCos(double x) => Trigonometry.SineCosine(x);

    /// <summary>Tangent of an angle in radians, any finite angle.</summary>
    /// <param name="x">Radians; infinite gives NaN.</param>
    public static double Tan(double x) => Trigonometry.Tangent(x);

    /// <summary>e to the power of x.</summary>
    /// <param name="x">Above 709.78… gives infinity, below −745.13… zero.</param>
    public static double Exp(double x) => Exponential.Exp(x);

    /// <summary>Natural logarithm.</summary>
    /// <param name="x">Zero of either sign gives −∞, below zero NaN, infinity itself.</param>
    public static double Log(double x) => Exponential.Log(x);

    /// <summary>Angle of the point (x, y) from the positive x axis, counter-clockwise.</summary>
    /// <param name="y">Ordinate; its sign, that of a zero too, is the result's.</param>
    /// <param name="x">Abscissa.</param>
    /// <returns>Radians, −π to π; zeros and infinities as IEEE 754 has them: (0, 0) is 0, (0, −0) π, (∞, ∞) π/4.</returns>
    public static double Atan2(double y, double x) => ArcTangent.Of(y, x);

    /// <summary>Length of the vector (x, y): √(x² + y²), safe against overflow.</summary>
    /// <param name="x">One side.</param>
    /// <param name="y">The other.</param>
    /// <returns>
    /// At least 0. Between 1e-140 and 1e140 the very bits of √(x·x + y·y), so lane-wise vector code may write that instead.
    /// </returns>
    public static double Hypot(double x, double y)
    {
        x = Math.Abs(x);
        y = Math.Abs(y);
        var longer = Math.Max(x, y);       // NaN if either is
        if (longer is > 1e-140 and < 1e140 or 0) return Math.Sqrt((x * x) + (y * y));
        if (!double.IsFinite(longer)) return longer;

        var scale = PowerOfTwo.Of(longer > 1 ? -600 : 600);
        x *= scale;
        y *= scale;
        return Math.Sqrt((x * x) + (y * y)) / scale;
    }
}
