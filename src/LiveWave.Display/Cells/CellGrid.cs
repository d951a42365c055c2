using System.Text;

namespace LiveWave.Display;

/// <summary>A picture made of cells. Whatever falls outside is cut off.</summary>
internal sealed class CellGrid
{
    private Cell[] _cells = [];

    /// <summary>Makes an empty picture.</summary>
    /// <param name="columns">Its width.</param>
    /// <param name="rows">Its height.</param>
    public CellGrid(int columns, int rows) => Resize(columns, rows);

    /// <summary>Its width.</summary>
    public int Columns { get; private set; }

    /// <summary>Its height.</summary>
    public int Rows { get; private set; }

    /// <summary>A cell.</summary>
    /// <param name="x">Its column.</param>
    /// <param name="y">Its row.</param>
    public ref Cell this[int x, int y] => ref _cells[(y * Columns) + x];

    /// <summary>All of it.</summary>
    public Region Whole => new(0, 0, Columns, Rows);

    /// <summary>Takes another size; everything is empty.</summary>
    /// <param name="columns">Its width.</param>
    /// <param name="rows">Its height.</param>
    public void Resize(int columns, int rows)
    {
        if (_cells.Length != columns * rows) _cells = new Cell[columns * rows];
        (Columns, Rows) = (columns, rows);
        Clear();
    }

    /// <summary>Everything empty.</summary>
    public void Clear() => _cells.AsSpan().Fill(Cell.Empty);

    /// <summary>Sets a cell.</summary>
    /// <param name="x">Its column.</param>
    /// <param name="y">Its row.</param>
    /// <param name="cell">What stands there.</param>
    public void Put(int x, int y, Cell cell)
    {
        if ((uint)x < (uint)Columns && (uint)y < (uint)Rows) this[x, y] = cell;
    }

    /// <summary>Sets a glyph; the ground stays.</summary>
    /// <param name="x">Its column.</param>
    /// <param name="y">Its row.</param>
    /// <param name="glyph">One column wide.</param>
    /// <param name="ink">Its colour.</param>
    /// <param name="style">How it stands out.</param>
    public void Put(int x, int y, char glyph, Colour ink, CellStyle style = CellStyle.Plain)
    {
        if ((uint)x < (uint)Columns && (uint)y < (uint)Rows) this[x, y] = new Cell(glyph, ink, this[x, y].Ground, style);
    }

    /// <summary>Writes one line of text.</summary>
    /// <param name="x">Its first column.</param>
    /// <param name="y">Its row.</param>
    /// <param name="atMost">Columns it may take; longer text ends in '…'.</param>
    /// <param name="text">The text.</param>
    /// <param name="ink">Its colour.</param>
    /// <param name="style">How it stands out.</param>
    /// <returns>The column after it.</returns>
    public int Write(int x, int y, int atMost, string text, Colour ink, CellStyle style = CellStyle.Plain)
    {
        var length = Math.Max(0, Math.Min(text.Length, atMost));
        for (var i = 0; i < length; i++)
        {
            var isCut = i == length - 1 && length < text.Length;
            Put(x + i, y, isCut ? '…' : text[i], ink, style);
        }

        return x + length;
    }

    /// <summary>The glyphs alone, line by line, without blanks at the ends of lines.</summary>
    public string Text()
    {
        var text = new StringBuilder();
        for (var y = 0; y < Rows; y++)
        {
            var line = new StringBuilder();
            for (var x = 0; x < Columns; x++) line.Append(this[x, y].Glyph);
            text.Append(line.ToString().TrimEnd()).Append('\n');
        }

        return text.ToString();
    }
}
