namespace LiveWave.Display;

/// <summary>A rectangle of cells.</summary>
/// <param name="X">Its first column, from 0.</param>
/// <param name="Y">Its first row, from 0, downwards.</param>
/// <param name="Columns">Its width.</param>
/// <param name="Rows">Its height.</param>
internal readonly record struct Region(int X, int Y, int Columns, int Rows)
{
    /// <summary>Some rows of it.</summary>
    /// <param name="from">First row, within the region.</param>
    /// <param name="rows">How many.</param>
    public Region Band(int from, int rows) => new(X, Y + from, Columns, rows);
}
