namespace LiveWave.Pipeline;

/// <summary>Marks rows as missing from a decision's due row on, so that an own pulse does not reach the estimators.</summary>
/// <remarks>Follows decisions, pulse and sham alike, never outcomes. Windows are spans of <c>index</c>. Allocates nothing.</remarks>
public sealed class BlankingMark
{
    private const int Room = 64;
    private readonly long[] _from = new long[Room];
    private readonly long[] _until = new long[Room];
    private readonly int _rows;
    private int _count;

    /// <summary>Makes ready.</summary>
    /// <param name="rows">Length of a blank, rows before the first conditioner; 0: never.</param>
    public BlankingMark(int rows)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(rows);
        _rows = rows;
    }

    /// <summary>Rows marked so far.</summary>
    public long MarkedRows { get; private set; }

    /// <summary>A decision falls due.</summary>
    /// <param name="dueIndex">The first row to be marked.</param>
    public void Add(long dueIndex)
    {
        if (_rows == 0) return;
        if (_count == Room)
        {
            _until[Room - 1] = Math.Max(_until[Room - 1], dueIndex + _rows);   // rather too much blank than too little
            return;
        }

        _from[_count] = dueIndex;
        _until[_count++] = dueIndex + _rows;
    }

    /// <summary>Is this row blank? Rows must be asked for in order.</summary>
    /// <param name="index">The row's index.</param>
    public bool Covers(long index)
    {
        var covered = false;
        for (var i = _count - 1; i >= 0; i--)
        {
            if (index >= _until[i])
            {
                _count--;
                _from[i] = _from[_count];
                _until[i] = _until[_count];
            }
            else if (index >= _from[i])
            {
                covered = true;
            }
        }

        if (covered) MarkedRows++;
        return covered;
    }
}
