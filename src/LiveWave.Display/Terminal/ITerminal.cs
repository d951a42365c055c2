namespace LiveWave.Display;

/// <summary>A terminal as the view needs it. One thread uses it, the view's; <see cref="IDisposable.Dispose"/> may come from another.</summary>
public interface ITerminal : IDisposable
{
    /// <summary>The colours it shows.</summary>
    ColourDepth Colours { get; }

    /// <summary>True for a screen that is drawn on; false for paper that is written on line by line.</summary>
    bool IsScreen { get; }

    /// <summary>Its size now, in characters; asked before every picture, so that a change is followed.</summary>
    /// <returns>Columns and rows; 0 where not known.</returns>
    (int Columns, int Rows) Size();

    /// <summary>Writes at once; may block on a slow line.</summary>
    /// <param name="text">Glyphs and control sequences.</param>
    void Write(ReadOnlySpan<char> text);
}
