using System.Globalization;

namespace LiveWave.Display.Tests;

/// <summary>What a terminal would show after what it was told: moves, wiping and looks, the part of ECMA-48 that a view uses.</summary>
internal sealed class VirtualScreen
{
    private readonly (char Glyph, string Look)[] _cells;
    private readonly int _columns;
    private (int X, int Y) _cursor;
    private string _look = "0";

    public VirtualScreen(int columns, int rows)
    {
        _columns = columns;
        _cells = new (char, string)[columns * rows];
        Wipe();
    }

    public (char Glyph, string Look) this[int x, int y] => _cells[(y * _columns) + x];

    public void Write(string text)
    {
        for (var i = 0; i < text.Length; i++)
        {
            if (text[i] == '\e')
            {
                var end = i + 2;
                while (!char.IsAsciiLetter(text[end])) end++;
                Obey(text[end], text[(i + 2)..end]);
                i = end;
                continue;
            }

            _cells[(_cursor.Y * _columns) + _cursor.X] = (text[i], _look);
            _cursor.X = Math.Min(_cursor.X + 1, _columns - 1);
        }
    }

    public string Row(int y) => new string([.. Enumerable.Range(0, _columns).Select(x => this[x, y].Glyph)]).TrimEnd();

    private void Obey(char what, string parameters)
    {
        if (what == 'm') _look = parameters;
        else if (what == 'J') Wipe();
        else if (what == 'H')
        {
            var at = parameters.Split(';').Select(number => int.Parse(number, CultureInfo.InvariantCulture)).ToArray();
            _cursor = (at[1] - 1, at[0] - 1);
        }
        else
        {
            Assert.Fail($"nothing here asks for '{what}'");
        }
    }

    private void Wipe() => _cells.AsSpan().Fill((' ', "0"));
}
