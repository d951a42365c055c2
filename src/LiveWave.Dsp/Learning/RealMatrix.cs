namespace LiveWave.Dsp;

/// <summary>A small dense real matrix, row after row. For learning, never per row of a stream: every operation allocates.</summary>
/// <remarks>Sums run in one written order with + − × ÷ only, so results are the same bits on every machine.</remarks>
/// <param name="rows">At least 1.</param>
/// <param name="columns">At least 1.</param>
internal sealed class RealMatrix(int rows, int columns)
{
    private readonly double[] _values = new double[rows * columns];

    /// <summary>Number of rows.</summary>
    internal int Rows { get; } = rows;

    /// <summary>Number of columns.</summary>
    internal int Columns { get; } = columns;

    /// <summary>One element.</summary>
    internal double this[int row, int column]
    {
        get => _values[(row * Columns) + column];
        set => _values[(row * Columns) + column] = value;
    }

    /// <summary>Ones on the diagonal.</summary>
    internal static RealMatrix Identity(int size)
    {
        var identity = new RealMatrix(size, size);
        for (var i = 0; i < size; i++) identity[i, i] = 1;
        return identity;
    }

    /// <summary>Elementwise sum of two matrices of one shape.</summary>
    public static RealMatrix operator +(RealMatrix a, RealMatrix b)
    {
        var sum = new RealMatrix(a.Rows, a.Columns);
        for (var i = 0; i < sum._values.Length; i++) sum._values[i] = a._values[i] + b._values[i];
        return sum;
    }

    /// <summary>Matrix product; the inner sizes agree.</summary>
    public static RealMatrix operator *(RealMatrix a, RealMatrix b)
    {
        var product = new RealMatrix(a.Rows, b.Columns);
        for (var row = 0; row < a.Rows; row++)
        {
            for (var column = 0; column < b.Columns; column++)
            {
                var sum = 0.0;
                for (var k = 0; k < a.Columns; k++) sum += a[row, k] * b[k, column];
                product[row, column] = sum;
            }
        }

        return product;
    }

    /// <summary>Rows become columns.</summary>
    internal RealMatrix Transposed()
    {
        var transposed = new RealMatrix(Columns, Rows);
        for (var row = 0; row < Rows; row++)
        {
            for (var column = 0; column < Columns; column++) transposed[column, row] = this[row, column];
        }

        return transposed;
    }

    /// <summary>Mean of a square matrix and its transpose: rounding makes covariances drift away from symmetry.</summary>
    internal RealMatrix Symmetrised()
    {
        var symmetric = new RealMatrix(Rows, Columns);
        for (var row = 0; row < Rows; row++)
        {
            for (var column = 0; column < Columns; column++)
            {
                symmetric[row, column] = 0.5 * (this[row, column] + this[column, row]);
            }
        }

        return symmetric;
    }

    /// <summary>Largest absolute element; NaN if any is.</summary>
    internal double LargestElement()
    {
        var largest = 0.0;
        foreach (var value in _values) largest = Math.Max(largest, Math.Abs(value));
        return largest;
    }
}
