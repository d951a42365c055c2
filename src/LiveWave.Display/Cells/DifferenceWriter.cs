using System.Globalization;
using System.Text;

namespace LiveWave.Display;

/// <summary>Turns the difference between two pictures into what a terminal must be told: moves, colours, glyphs, and no more.</summary>
/// <remarks>Knows what the terminal shows by having told it; <see cref="Forget"/> when that may have changed. Every frame is one
/// text, written at once, so that nobody sees half of it.</remarks>
internal sealed class DifferenceWriter
{
    // A jump costs about as many characters as this many unchanged cells of the same look.
    private const int ShortestJump = 4;

    private readonly StringBuilder _text = new(16 * 1024);
    private readonly ColourDepth _depth;
    private Cell[] _shown = [];
    private int _columns;
    private int _rows;
    private Cell _look;
    private bool _hasLook;
    private (int X, int Y) _cursor;

    /// <summary>Makes a writer for a terminal of which nothing is known yet.</summary>
    /// <param name="depth">The colours it shows.</param>
    public DifferenceWriter(ColourDepth depth) => _depth = depth;

    /// <summary>The terminal may show anything now: it is wiped, and the next picture told in full.</summary>
    public void Forget() => _shown = [];

    /// <summary>The next picture is told in full, over what is there: nothing is wiped, so nothing flickers.</summary>
    public void Repeat() => _shown.AsSpan().Clear();

    /// <summary>What to tell so that the terminal shows a picture.</summary>
    /// <param name="picture">The picture.</param>
    /// <returns>Valid until the next call; empty if it shows it already.</returns>
    public StringBuilder Difference(CellGrid picture)
    {
        _text.Clear();
        (_hasLook, _cursor) = (false, (-1, -1));
        if (_shown.Length == 0 || _columns != picture.Columns || _rows != picture.Rows) BeginAnew(picture);
        for (var y = 0; y < _rows; y++)
        {
            for (var x = 0; x < _columns; x++)
            {
                if (Shown(x, y) != picture[x, y]) Tell(picture, x, y);
            }
        }

        if (_hasLook) _text.Append("\e[0m");
        return _text;
    }

    private ref Cell Shown(int x, int y) => ref _shown[(y * _columns) + x];

    private void BeginAnew(CellGrid picture)
    {
        (_columns, _rows) = (picture.Columns, picture.Rows);
        _shown = new Cell[_columns * _rows];   // no picture holds a cell of this kind: all is told
        _text.Append("\e[0m\e[2J");
    }

    private void Tell(CellGrid picture, int x, int y)
    {
        var isNear = _cursor.Y == y && x >= _cursor.X && x - _cursor.X < ShortestJump;
        if (isNear)
        {
            for (var between = _cursor.X; between < x; between++) Put(picture, between, y);
        }
        else
        {
            _text.Append(CultureInfo.InvariantCulture, $"\e[{y + 1};{x + 1}H");
        }

        Put(picture, x, y);

        // After the last column terminals differ in where the cursor stands.
        _cursor = x == _columns - 1 ? (-1, -1) : (x + 1, y);
    }

    private void Put(CellGrid picture, int x, int y)
    {
        var cell = picture[x, y];
        if (!_hasLook || cell.Style != _look.Style || cell.Ink != _look.Ink || cell.Ground != _look.Ground) Look(cell);
        _text.Append(cell.Glyph);
        Shown(x, y) = cell;
    }

    private void Look(in Cell cell)
    {
        _text.Append("\e[0");
        if ((cell.Style & CellStyle.Bold) != 0) _text.Append(";1");
        if ((cell.Style & CellStyle.Reversed) != 0) _text.Append(";7");
        ColourCode.Append(_text, cell.Ink, isGround: false, _depth);
        ColourCode.Append(_text, cell.Ground, isGround: true, _depth);
        _text.Append('m');
        (_look, _hasLook) = (cell, true);
    }
}
