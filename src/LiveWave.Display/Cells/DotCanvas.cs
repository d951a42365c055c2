namespace LiveWave.Display;

/// <summary>A fine drawing out of Braille patterns: each cell holds two by four dots.</summary>
internal sealed class DotCanvas
{
    private const char NoDots = '\u2800';
    private static readonly byte[] Bits = [0x01, 0x08, 0x02, 0x10, 0x04, 0x20, 0x40, 0x80];   // row by row, left then right

    private readonly byte[] _dots;

    /// <summary>Makes an empty canvas.</summary>
    /// <param name="columns">Its width in cells.</param>
    /// <param name="rows">Its height in cells.</param>
    public DotCanvas(int columns, int rows)
    {
        (Columns, Rows) = (columns, rows);
        _dots = new byte[columns * rows];
    }

    /// <summary>Its width in cells.</summary>
    public int Columns { get; }

    /// <summary>Its height in cells.</summary>
    public int Rows { get; }

    /// <summary>Its width in dots.</summary>
    public int Width => 2 * Columns;

    /// <summary>Its height in dots.</summary>
    public int Height => 4 * Rows;

    /// <summary>Sets a dot.</summary>
    /// <param name="x">From the left, within the width.</param>
    /// <param name="y">From the top, within the height.</param>
    public void Set(int x, int y) => _dots[(y / 4 * Columns) + (x / 2)] |= Bits[(y % 4 * 2) + (x % 2)];

    /// <summary>The glyph of a cell; a blank where no dot is set.</summary>
    /// <param name="column">Its column.</param>
    /// <param name="row">Its row.</param>
    public char Glyph(int column, int row)
    {
        var dots = _dots[(row * Columns) + column];
        return dots == 0 ? ' ' : (char)(NoDots + dots);
    }
}
