namespace LiveWave.Display.Tests;

/// <summary>Keeps what it is told, and has the size a test gives it.</summary>
internal sealed class FakeTerminal : ITerminal
{
    public List<string> Written { get; } = [];

    public ColourDepth Colours { get; init; } = ColourDepth.Full;

    public bool IsScreen { get; init; } = true;

    public (int Columns, int Rows) Extent { get; set; } = (80, 24);

    public bool IsDisposed { get; private set; }

    public (int Columns, int Rows) Size() => Extent;

    public void Write(ReadOnlySpan<char> text) => Written.Add(text.ToString());

    public void Dispose() => IsDisposed = true;
}
