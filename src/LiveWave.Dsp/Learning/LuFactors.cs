namespace LiveWave.Dsp;

/// <summary>Lower and upper triangular factors of a square matrix, with partial pivoting: solves A·X = B.</summary>
internal sealed class LuFactors
{
    private readonly RealMatrix _factors;
    private readonly int[] _order;

    /// <summary>Factorises a square matrix.</summary>
    /// <param name="matrix">Left unchanged. A singular one gives solutions that are not finite.</param>
    internal LuFactors(RealMatrix matrix)
    {
        var size = matrix.Rows;
        _factors = matrix + new RealMatrix(size, size);
        _order = new int[size];
        for (var i = 0; i < size; i++) _order[i] = i;
        for (var column = 0; column < size; column++)
        {
            Exchange(column, PivotOf(column));
            Eliminate(column);
        }
    }

    /// <summary>Solves A·X = B.</summary>
    /// <param name="right">B, as many rows as A.</param>
    internal RealMatrix Solve(RealMatrix right)
    {
        var size = _factors.Rows;
        var solution = new RealMatrix(size, right.Columns);
        for (var column = 0; column < right.Columns; column++)
        {
            for (var row = 0; row < size; row++)
            {
                var sum = right[_order[row], column];
                for (var k = 0; k < row; k++) sum -= _factors[row, k] * solution[k, column];
                solution[row, column] = sum;
            }

            for (var row = size - 1; row >= 0; row--)
            {
                var sum = solution[row, column];
                for (var k = row + 1; k < size; k++) sum -= _factors[row, k] * solution[k, column];
                solution[row, column] = sum / _factors[row, row];
            }
        }

        return solution;
    }

    private int PivotOf(int column)
    {
        var pivot = column;
        for (var row = column + 1; row < _factors.Rows; row++)
        {
            if (Math.Abs(_factors[row, column]) > Math.Abs(_factors[pivot, column])) pivot = row;
        }

        return pivot;
    }

    private void Exchange(int row, int other)
    {
        if (row == other) return;
        (_order[row], _order[other]) = (_order[other], _order[row]);
        for (var k = 0; k < _factors.Columns; k++)
        {
            (_factors[row, k], _factors[other, k]) = (_factors[other, k], _factors[row, k]);
        }
    }

    private void Eliminate(int column)
    {
        for (var row = column + 1; row < _factors.Rows; row++)
        {
            var share = _factors[row, column] / _factors[column, column];
            _factors[row, column] = share;
            for (var k = column + 1; k < _factors.Columns; k++) _factors[row, k] -= share * _factors[column, k];
        }
    }
}
