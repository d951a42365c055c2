namespace LiveWave.Dsp;

/// <summary>The modulus k of elliptic functions that an elliptic filter of a given order has: the degree equation.</summary>
/// <remarks>
/// With the modulus k1 = ripple over attenuation and the nome q = exp(−π·K'/K), q(k) = q(k1)^(1/order). K by the arithmetic-geometric mean
/// (Gauss), k from its nome by Jacobi's theta series; both converge within a few steps, without tables.
/// </remarks>
internal static class EllipticModulus
{
    private const double Enough = 1e-18;

    /// <summary>Solves the degree equation.</summary>
    /// <param name="order">At least 1.</param>
    /// <param name="k1">Above 0, below 1.</param>
    /// <returns>k, above k1 or equal.</returns>
    public static double Of(int order, double k1)
    {
        var complement = Math.Sqrt((1 - k1) * (1 + k1));
        var quarters = Mean(1, complement) / Mean(1, k1);       // K'/K of k1
        return OfNome(Portable.Exp(-Math.PI * quarters / order));
    }

    /// <summary>Arithmetic-geometric mean: K(k) = π/2 over the mean of 1 and k'.</summary>
    private static double Mean(double a, double b)
    {
        while (Math.Abs(a - b) > 1e-15 * a) (a, b) = ((a + b) / 2, Math.Sqrt(a * b));
        return a;
    }

    /// <summary>k = (θ2/θ3)² = 4√q·((1 + q² + q⁶ + …)/(1 + 2q + 2q⁴ + …))².</summary>
    private static double OfNome(double q)
    {
        var (above, below) = (1.0, 1.0);
        var (evenPower, squarePower, power) = (1.0, 1.0, 1.0);
        for (var n = 1; squarePower > Enough; n++)
        {
            squarePower *= power * power * q;       // q^(n²) = q^((n−1)²) · q^(2n−1)
            power *= q;                             // q^n
            evenPower *= power * power;             // q^(n(n+1)) = q^(n(n−1)) · q^(2n)
            above += evenPower;
            below += 2 * squarePower;
        }

        return 4 * Math.Sqrt(q) * (above / below) * (above / below);
    }
}
