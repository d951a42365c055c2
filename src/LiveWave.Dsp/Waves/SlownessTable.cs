namespace LiveWave.Dsp;

/// <summary>90 % interval of a wave's slowness, given that it passed the gate over a uniform field. Immutable; asking does not
/// allocate.</summary>
/// <remarks>
/// d = √(2·dL) is the length of the wave vector in standard errors, d² non-central chi-square with λ = δ², δ the true length, cut
/// below twice the gate. δ at low, middle, high solves P(χ²(δ²) &gt; d²)/P(χ²(δ²) &gt; 2·gate) = 0.05, 0.5, 0.95; 0 where none does:
/// the speed may be infinite. Intervals conditional on having passed a threshold: Zhong and Prentice (2008). Tabled is
/// (δ² − d²)/d over ln(1 + (d − d₁)/c), where δ leaves 0 at d₁ and c is how quickly it then changes: a quarter of the nearer of
/// the gate and 1/d₁, since at first δ² grows as exp(d²/2).
/// </remarks>
internal sealed class SlownessTable
{
    private const double Step = 0.05;        // of the logarithm: with six nodes around factors are right to 1e-6
    private const double Longest = 128;      // beyond what 256 channels without any noise reach

    private static readonly double[] Around = [1, -5, 10, -10, 5, -1];

    private readonly int _freedom;
    private readonly double _gated;          // d₀
    private readonly ChiSquareTails _gateTails;
    private readonly Curve _low;
    private readonly Curve _middle;
    private readonly Curve _high;

    /// <summary>Solves for all nodes; takes some milliseconds.</summary>
    /// <param name="gate">The gate on dL, above 0.</param>
    /// <param name="rank">Components of the wave vector: 2 in a plane, 1 on a line.</param>
    public SlownessTable(double gate, int rank)
    {
        _freedom = rank;
        _gated = Math.Sqrt(2 * gate);
        _gateTails = new ChiSquareTails(rank, 2 * gate);
        (_low, _middle, _high) = (Solve(0.05), Solve(0.5), Solve(0.95));
    }

    /// <summary>Factors on the slowness |k|/ω at the lower end, in the middle and at the upper end of its interval.</summary>
    /// <param name="gainOverUniform">dL, at least the gate.</param>
    public (double Low, double Middle, double High) Factors(double gainOverUniform)
    {
        var d = Math.Sqrt(2 * gainOverUniform);
        return (_low.Factor(d), _middle.Factor(d), _high.Factor(d));
    }

    private Curve Solve(double probability)
    {
        var leaves = Leaves(probability);
        var scale = 0.25 * Math.Min(leaves - _gated, 1 / leaves);
        var nodes = new double[(int)(Portable.Log(1 + Longest / scale) / Step) + 2];
        nodes[0] = -leaves;
        var noncentrality = 0.0;
        for (var i = 1; i < nodes.Length; i++)
        {
            var d = leaves + scale * (Portable.Exp(i * Step) - 1);
            noncentrality = Root(new ChiSquareTails(_freedom, d * d), probability, noncentrality, (d + 8) * (d + 8));
            nodes[i] = (noncentrality - d * d) / d;
        }

        return new Curve(leaves, scale, nodes);
    }

    // The d from which on the solution is above 0.
    private double Leaves(double probability)
    {
        var (low, high) = (_gated, _gated + 8);
        for (var i = 0; i < 60; i++)
        {
            var middle = 0.5 * (low + high);
            if (new ChiSquareTails(_freedom, middle * middle).Beyond(0) >= probability * _gateTails.Beyond(0)) low = middle;
            else high = middle;
        }

        return high;
    }

    // False position with the stale end's weight halved (Illinois): the ratio rises with λ.
    private double Root(ChiSquareTails tails, double probability, double low, double high)
    {
        double Excess(double noncentrality) => tails.Beyond(noncentrality) / _gateTails.Beyond(noncentrality) - probability;
        var (below, above) = (Excess(low), Excess(high));
        if (below >= 0) return low;
        var kept = 0;
        for (var i = 0; i < 100 && high - low > 1e-11 * (1 + high); i++)
        {
            var next = (low * above - high * below) / (above - below);
            if (!(next > low && next < high)) next = 0.5 * (low + high);
            var excess = Excess(next);
            if (excess < 0)
            {
                (low, below) = (next, excess);
                if (kept == 1) above *= 0.5;
                kept = 1;
            }
            else
            {
                (high, above) = (next, excess);
                if (kept == -1) below *= 0.5;
                kept = -1;
            }

            if (Math.Abs(excess) < 1e-14) return next;
        }

        return 0.5 * (low + high);
    }

    private sealed class Curve(double leaves, double scale, double[] nodes)
    {
        public double Factor(double d)
        {
            if (!(d > leaves)) return 0;
            var at = Math.Min(Portable.Log(1 + (d - leaves) / scale) / Step, nodes.Length - 1);
            return Math.Sqrt(Math.Max(d * d + Between(at) * d, 0)) / d;
        }

        // Lagrange's polynomial through six nodes, in barycentric form.
        private double Between(double at)
        {
            var left = Math.Clamp((int)at - 2, 0, nodes.Length - Around.Length);
            var (sum, weights) = (0.0, 0.0);
            for (var j = 0; j < Around.Length; j++)
            {
                var distance = at - (left + j);
                if (distance == 0) return nodes[left + j];
                var weight = Around[j] / distance;
                sum += weight * nodes[left + j];
                weights += weight;
            }

            return sum / weights;
        }
    }
}
