namespace LiveWave.Dsp;

/// <summary>Triangular factor of a symmetric positive definite matrix, in place, row-major. Nothing here allocates but
/// <see cref="Inverse"/>.</summary>
internal static class Cholesky
{
    private const double LeastPivot = 1e-14;   // of the largest diagonal value: below it only rounding is left

    /// <summary>Replaces the lower triangle, diagonal included, by L with L·Lᵀ = matrix; leaves the upper one.</summary>
    /// <param name="matrix">n rows of n values.</param>
    /// <param name="n">Order.</param>
    /// <returns>False if the matrix is not positive definite; it is spoilt then.</returns>
    public static bool TryFactor(Span<double> matrix, int n)
    {
        var least = 0.0;
        for (var i = 0; i < n; i++) least = Math.Max(least, matrix[i * n + i]);
        least *= LeastPivot;
        for (var row = 0; row < n; row++)
        {
            for (var column = 0; column <= row; column++)
            {
                var left = matrix.Slice(row * n, column);
                var rest = matrix[row * n + column] - Sums.Dot(left, matrix.Slice(column * n, column));
                if (column < row)
                {
                    matrix[row * n + column] = rest / matrix[column * n + column];
                }
                else
                {
                    if (!(rest > least)) return false;
                    matrix[row * n + row] = Math.Sqrt(rest);
                }
            }
        }

        return true;
    }

    /// <summary>Replaces v by the solution of L·x = v.</summary>
    /// <param name="factor">From <see cref="TryFactor"/>.</param>
    /// <param name="n">Order.</param>
    /// <param name="v">n values.</param>
    public static void Forward(ReadOnlySpan<double> factor, int n, Span<double> v)
    {
        for (var i = 0; i < n; i++)
        {
            v[i] = (v[i] - Sums.Dot(factor.Slice(i * n, i), v[..i])) / factor[i * n + i];
        }
    }

    /// <summary>Replaces v by the solution of Lᵀ·x = v.</summary>
    /// <param name="factor">From <see cref="TryFactor"/>.</param>
    /// <param name="n">Order.</param>
    /// <param name="v">n values.</param>
    public static void Backward(ReadOnlySpan<double> factor, int n, Span<double> v)
    {
        for (var i = n - 1; i >= 0; i--)
        {
            var rest = v[i];
            for (var j = i + 1; j < n; j++) rest -= factor[j * n + i] * v[j];
            v[i] = rest / factor[i * n + i];
        }
    }

    /// <summary>Inverse of the factored matrix, exactly symmetric.</summary>
    /// <param name="factor">From <see cref="TryFactor"/>.</param>
    /// <param name="n">Order.</param>
    public static double[] Inverse(ReadOnlySpan<double> factor, int n)
    {
        var inverse = new double[n * n];
        for (var row = 0; row < n; row++)
        {
            var unit = inverse.AsSpan(row * n, n);
            unit[row] = 1;
            Forward(factor, n, unit);
            Backward(factor, n, unit);
        }

        for (var row = 0; row < n; row++)
        {
            for (var column = 0; column < row; column++)
            {
                var mean = 0.5 * (inverse[row * n + column] + inverse[column * n + row]);
                inverse[row * n + column] = mean;
                inverse[column * n + row] = mean;
            }
        }

        return inverse;
    }
}
