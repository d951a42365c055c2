namespace LiveWave.Dsp;

/// <summary>Upper tails of chi-square laws with one or two degrees of freedom, central and not, beyond one limit.</summary>
/// <remarks>A non-central law is a mixture of central ones with Poisson(λ/2) weights. Weights are made from their largest one
/// outwards and normalised by their sum: no gamma function, no overflow. Right to about 1e-13.</remarks>
internal sealed class ChiSquareTails
{
    private const double Negligible = 1e-18;
    private const double FractionFrom = 3;     // the continued fraction of erfc √y holds all digits from here on
    private const int FractionTerms = 100;

    private readonly double[] _central;

    /// <summary>Prepares the central tails.</summary>
    /// <param name="freedom">1 or 2.</param>
    /// <param name="limit">The limit, at least 0.</param>
    public ChiSquareTails(int freedom, double limit) => _central = Central(freedom, 0.5 * limit);

    /// <summary>P(χ²(λ) &gt; limit).</summary>
    /// <param name="noncentrality">λ, at least 0.</param>
    public double Beyond(double noncentrality)
    {
        var mean = 0.5 * noncentrality;
        if (!(mean > 0)) return Tail(0);
        var mode = (int)mean;
        var (weight, weights, sum) = (1.0, 0.0, 0.0);
        for (var j = mode; j >= 0 && weight > Negligible; j--)
        {
            weights += weight;
            sum += weight * Tail(j);
            weight *= j / mean;
        }

        weight = mean / (mode + 1);
        for (var j = mode + 1; weight > Negligible; j++)
        {
            weights += weight;
            sum += weight * Tail(j);
            weight *= mean / (j + 1);
        }

        return sum / weights;
    }

    private double Tail(int pairsMore) => pairsMore < _central.Length ? _central[pairsMore] : 1;

    // Tail j, of freedom + 2j degrees, adds to tail j − 1 the term e^−y y^(j − 1 + f/2)/Γ(j + f/2); all terms add up to 1, with
    // one degree of freedom to erf √y, the rest being the first tail erfc √y.
    private static double[] Central(int freedom, double y)
    {
        var tails = new double[(int)(y + 12 * Math.Sqrt(y)) + 60];
        var first = 2 - freedom;
        if (!(y > 0))
        {
            Array.Fill(tails, 1);
            return tails;
        }

        var mode = Math.Max((int)(y - 0.5 * freedom + 1), first);
        tails[mode] = 1;
        for (var i = mode + 1; i < tails.Length; i++) tails[i] = tails[i - 1] * y / (i - 1 + 0.5 * freedom);
        for (var i = mode - 1; i >= first; i--) tails[i] = tails[i + 1] * (i + 0.5 * freedom) / y;
        var weights = Sums.Sum(tails);
        var tail = first == 0 ? 0 : ErrorFunctionComplement(y, weights / tails[1]);
        var total = 1 - tail;
        if (first == 1) tails[0] = tail;
        for (var i = first; i < tails.Length; i++)
        {
            tail += tails[i] / weights * total;
            tails[i] = Math.Min(tail, 1);
        }

        return tails;
    }

    // erfc √y. Small y: 1 − the sum of all terms, the first of which is 2 e^−y √(y/π); else the fraction of Laplace, from its end.
    private static double ErrorFunctionComplement(double y, double termsOverFirst)
    {
        var density = Portable.Exp(-y) / Math.Sqrt(Math.PI);
        var root = Math.Sqrt(y);
        if (y < FractionFrom) return 1 - 2 * density * root * termsOverFirst;
        var fraction = root;
        for (var i = FractionTerms; i >= 1; i--) fraction = root + 0.5 * i / fraction;
        return density / fraction;
    }
}
