using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads the signals of one rate from an EDF or BDF file, row by row.</summary>
/// <remarks>
/// <para>Values are in physical units: number × scale + offset, both from the limits in the header. The trigger word of BDF
/// (<c>Status</c>) comes as its numbers. The wire bytes of a block are the numbers as they lie in the file, row by row.</para>
/// <para>Stamps are seconds from the start of the file: when the data record begins (its own time in EDF+, else counted) plus the
/// place within it. Where a discontinuous file jumps, so do the stamps. A record of such a file that doesn't tell its time is left
/// out: a counted stamp would hide the gap.</para>
/// <para>Memory is bounded whatever the file says; nothing is allocated while rows are read.</para>
/// </remarks>
public sealed class EdfFeed : RecordingFeed
{
    private readonly EdfHeader _header;
    private readonly FileWindow _window;
    private readonly ReadWarnings _warnings;
    private readonly EdfTimeline _timeline;
    private readonly EdfSlab _slab;
    private readonly RowDecoder _decoder;
    private readonly byte[] _row;
    private readonly int _samplesPerRecord;

    private long _record = -1;
    private int _slabStart;
    private int _inSlab;
    private double _recordStartSeconds;
    private long _received;
    private bool _isOver;
    private bool _isDisposed;

    /// <summary>Opens a stream.</summary>
    /// <param name="path">The file.</param>
    /// <param name="header">Its header.</param>
    /// <param name="group">The stream.</param>
    /// <param name="met">What was met when the file was opened.</param>
    internal EdfFeed(string path, EdfHeader header, EdfGroup group, IReadOnlyList<Status> met)
        : this(path, header, group, met, new ReadWarnings(path))
    {
    }

    private EdfFeed(string path, EdfHeader header, EdfGroup group, IReadOnlyList<Status> met, ReadWarnings warnings)
        : base(group.Described, group.Described.ToFormat(warnings))
    {
        warnings.AddAll(met);
        _header = header;
        _warnings = warnings;
        _samplesPerRecord = group.SamplesPerRecord;
        _slabStart = _samplesPerRecord;
        _decoder = new RowDecoder(Format);
        _row = new byte[_decoder.RowBytes];
        _window = FileWindow.Open(path, FileWindow.ReadBytes);
        _timeline = new EdfTimeline(_window, path, header);
        _slab = new EdfSlab(_window, header, group);
    }

    /// <inheritdoc/>
    public override IReadOnlyList<Status> Warnings => _warnings.All;

    /// <inheritdoc/>
    public override PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        ArgumentNullException.ThrowIfNull(into);
        ObjectDisposedException.ThrowIf(_isDisposed, this);
        if (into.Format.ChannelCount != Format.ChannelCount)
        {
            throw new ArgumentException($"the block has {into.Format.ChannelCount} channels, the stream {Format.ChannelCount}", nameof(into));
        }

        into.Begin(_received);
        while (into.Count < into.Capacity && FindRow()) Append(into);
        return into.Count > 0 ? PullResult.Samples : PullResult.Ended;
    }

    /// <inheritdoc/>
    protected override void Dispose(bool disposing)
    {
        _isDisposed = true;
        _window.Dispose();
    }

    private void Append(SampleBlock into)
    {
        var sample = _slabStart + _inSlab;
        _slab.CopyRow(_inSlab, _row);
        _decoder.Decode(_row, into.Append(_recordStartSeconds + (sample * _header.RecordSeconds / _samplesPerRecord)));
        into.AppendWire(_row);
        _inSlab++;
        _received++;
    }

    private bool FindRow()
    {
        while (!_isOver && _inSlab == _slab.Count) NextSlab();
        return !_isOver;
    }

    private void NextSlab()
    {
        _slabStart += _slab.Count;
        _inSlab = 0;
        if (_slabStart >= _samplesPerRecord && !NextRecord())
        {
            _isOver = true;
            return;
        }

        if (_slab.Load(_record, _slabStart)) return;
        _isOver = true;
        _warnings.Add(_header.RecordStart(_record), "the file became shorter while it was read", 0);
    }

    private bool NextRecord()
    {
        _slabStart = 0;
        do
        {
            _record++;
            if (_record >= _header.Records) return false;
        }
        while (!_timeline.TryStart(_record, out _recordStartSeconds));

        return true;
    }
}
