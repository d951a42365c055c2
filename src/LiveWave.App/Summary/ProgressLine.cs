using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>One line on the terminal that says how far a run is; nothing where nobody looks.</summary>
internal sealed class ProgressLine : IDisposable
{
    private readonly StreamLoop _loop;
    private readonly bool _isShown;
    private bool _hasShown;

    public ProgressLine(StreamLoop loop, bool isShown)
    {
        _loop = loop;
        _isShown = isShown && !Console.IsErrorRedirected;
    }

    public void Show()
    {
        if (!_isShown) return;
        _hasShown = true;
        Console.Error.Write($"\r{_loop.Rows} rows judged, {_loop.Repair.LostRows} lost ");
    }

    public void Dispose()
    {
        if (_hasShown) Console.Error.Write("\r" + new string(' ', 60) + "\r");
    }
}
