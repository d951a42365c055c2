namespace LiveWave.Dsp;

/// <summary>Jacobi's elliptic functions by Landen's descending transformation: moduli that vanish, where they are sine and cosine.</summary>
/// <remarks>v ← (v/(1 + √(1 − v²)))²; five or six steps to nothing. After Orfanidis (2006).</remarks>
internal sealed class LandenSequence
{
    private const double Vanished = 1e-17;

    private readonly double _modulus;
    private readonly List<double> _moduli = [];

    /// <param name="modulus">k, above 0, below 1.</param>
    public LandenSequence(double modulus)
    {
        _modulus = modulus;
        while (modulus > Vanished)
        {
            var root = modulus / (1 + Math.Sqrt((1 - modulus) * (1 + modulus)));
            modulus = root * root;
            _moduli.Add(modulus);
        }
    }

    /// <summary>cd(u·K, k) of what the cosine of u·π/2 is, both complex.</summary>
    /// <param name="re">Real part of cos(u·π/2).</param>
    /// <param name="im">Its imaginary part.</param>
    public (double Re, double Im) FromCosine(double re, double im)
    {
        for (var n = _moduli.Count - 1; n >= 0; n--)
        {
            // w ← (1 + v)·w/(1 + v·w²)
            var v = _moduli[n];
            var (belowRe, belowIm) = (1 + (v * ((re * re) - (im * im))), v * 2 * re * im);
            var size = ((belowRe * belowRe) + (belowIm * belowIm)) / (1 + v);
            (re, im) = (((re * belowRe) + (im * belowIm)) / size, ((im * belowRe) - (re * belowIm)) / size);
        }

        return (re, im);
    }

    /// <summary>The y for which sn(j·(2/π)·asinh(y)·K, k) is j·x: the way back, along the imaginary axis.</summary>
    /// <param name="x">Above 0.</param>
    public double ToHyperbolicSine(double x)
    {
        var before = _modulus;
        foreach (var v in _moduli)
        {
            x = 2 * x / ((1 + v) * (1 + Math.Sqrt(1 + (before * x * (before * x)))));
            before = v;
        }

        return x;
    }
}
