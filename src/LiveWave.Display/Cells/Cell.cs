namespace LiveWave.Display;

/// <summary>One place of a screen of characters.</summary>
/// <param name="Glyph">One column wide.</param>
/// <param name="Ink">Colour of the glyph.</param>
/// <param name="Ground">Colour behind it.</param>
/// <param name="Style">How it stands out.</param>
internal readonly record struct Cell(char Glyph, Colour Ink, Colour Ground, CellStyle Style = CellStyle.Plain)
{
    /// <summary>Nothing there.</summary>
    public static Cell Empty { get; } = new(' ', Slate.Text, Slate.Ground);
}
