namespace LiveWave.Dsp;

/// <summary>Hyperbolic functions as filter designs need them.</summary>
internal static class Hyperbolic
{
    /// <summary>sinh and cosh of asinh(x)/n.</summary>
    /// <param name="x">Above 0.</param>
    /// <param name="n">At least 1.</param>
    public static (double Sinh, double Cosh) OfShare(double x, int n)
    {
        var up = Portable.Exp(Portable.Log(x + Math.Sqrt((x * x) + 1)) / n);
        return ((up - (1 / up)) / 2, (up + (1 / up)) / 2);
    }
}
