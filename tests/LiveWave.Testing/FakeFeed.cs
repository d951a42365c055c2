using LiveWave.Abstractions;

namespace LiveWave.Testing;

/// <summary>A feed of rows held in memory, delivered in blocks of the size that the block asks for.</summary>
public sealed class FakeFeed : IFeed
{
    private readonly double[][] _rows;
    private readonly double[] _stamps;
    private readonly HashSet<int> _restarts = [];
    private int _next;

    /// <summary>Makes a feed with a stamp on every sampling instant.</summary>
    /// <param name="format">The stream.</param>
    /// <param name="rows">Row after row.</param>
    /// <param name="firstStampSeconds">Stamp of the first row.</param>
    public FakeFeed(StreamFormat format, double[][] rows, double firstStampSeconds = 100)
        : this(format, rows, [.. Enumerable.Range(0, rows.Length).Select(i => firstStampSeconds + (i / format.NominalRateHz))])
    {
    }

    /// <summary>Makes a feed with stamps of one's own.</summary>
    /// <param name="format">The stream.</param>
    /// <param name="rows">Row after row.</param>
    /// <param name="stamps">One a row.</param>
    public FakeFeed(StreamFormat format, double[][] rows, double[] stamps)
    {
        Format = format;
        _rows = rows;
        _stamps = stamps;
    }

    /// <inheritdoc/>
    public StreamFormat Format { get; }

    /// <summary>The stream begins anew before this row; the block before it is cut there.</summary>
    /// <param name="row">Counted from 0.</param>
    public FakeFeed RestartBefore(int row)
    {
        _ = _restarts.Add(row);
        return this;
    }

    /// <inheritdoc/>
    public PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        if (_next == _rows.Length) return PullResult.Ended;
        into.Begin(_next, _restarts.Contains(_next));
        do
        {
            _rows[_next].CopyTo(into.Append(_stamps[_next]));
            _next++;
        }
        while (into.Count < into.Capacity && _next < _rows.Length && !_restarts.Contains(_next));
        return PullResult.Samples;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
    }
}
