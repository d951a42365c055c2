using System.Text;

namespace LiveWave.Display;

/// <summary>Draws a session on a screen of characters, and follows its size.</summary>
internal sealed class ScreenFace : IFace
{
    // What somebody typed, or another program printed, is on the screen and not ours: it goes with the next picture told in full.
    private const int FramesBetweenFullPictures = 50;

    private readonly ITerminal _terminal;
    private readonly DifferenceWriter _writer;
    private readonly Screen _screen;
    private readonly CellGrid _grid = new(0, 0);
    private int _frames;

    public ScreenFace(ITerminal terminal)
    {
        _terminal = terminal;
        _writer = new DifferenceWriter(terminal.Colours);
        _screen = new Screen(terminal.Colours);
    }

    public void Show(SessionPicture picture)
    {
        var (columns, rows) = _terminal.Size();
        if (columns < 1 || rows < 1)
        {
            _writer.Forget();
            return;
        }

        if ((columns, rows) != (_grid.Columns, _grid.Rows)) _grid.Resize(columns, rows);
        if (++_frames % FramesBetweenFullPictures == 0) _writer.Repeat();
        _screen.Draw(_grid, picture);
        Send(_writer.Difference(_grid));
    }

    // One write a frame, so that nobody sees half of one.
    private void Send(StringBuilder text)
    {
        if (text.Length > 0) _terminal.Write(text.ToString());
    }
}
