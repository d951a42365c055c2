namespace LiveWave.Recordings;

/// <summary>Some consecutive samples of all signals of a stream. In a data record each signal lies in one piece; a slab holds as many
/// samples of each as fit a fixed memory, whatever the length of the record.</summary>
internal sealed class EdfSlab
{
    private const int MostBytes = 1 << 21;

    private readonly FileWindow _window;
    private readonly EdfHeader _header;
    private readonly long[] _offsets;
    private readonly int _samplesPerRecord;
    private readonly int _most;
    private readonly byte[] _bytes;

    /// <summary>Prepares for a stream. Allocates here and never again.</summary>
    /// <param name="window">The file.</param>
    /// <param name="header">Its header.</param>
    /// <param name="group">The stream.</param>
    public EdfSlab(FileWindow window, EdfHeader header, EdfGroup group)
    {
        _window = window;
        _header = header;
        _offsets = [.. group.Signals.Select(signal => signal.OffsetInRecord)];
        _samplesPerRecord = group.SamplesPerRecord;
        _most = Math.Clamp(MostBytes / (_offsets.Length * header.SampleBytes), 1, _samplesPerRecord);
        _bytes = new byte[_offsets.Length * _most * header.SampleBytes];
    }

    /// <summary>Samples of each signal that are loaded.</summary>
    public int Count { get; private set; }

    /// <summary>Loads samples of one data record.</summary>
    /// <param name="record">From 0.</param>
    /// <param name="firstSample">The first one within the record.</param>
    /// <returns>False if the file has become shorter; nothing is loaded then.</returns>
    public bool Load(long record, int firstSample)
    {
        Count = 0;
        var count = Math.Min(_most, _samplesPerRecord - firstSample);
        var start = _header.RecordStart(record);
        var size = _header.SampleBytes;
        if (_header.RecordBytes <= _window.Size) _window.Peek(start, (int)_header.RecordBytes);      // one read, then copies
        for (var i = 0; i < _offsets.Length; i++)
        {
            var into = _bytes.AsSpan(i * _most * size, count * size);
            if (_window.Read(start + _offsets[i] + ((long)firstSample * size), into) < into.Length) return false;
        }

        Count = count;
        return true;
    }

    /// <summary>Copies one sample of all signals, as the numbers lie in the file.</summary>
    /// <param name="sample">0 to <see cref="Count"/> − 1.</param>
    /// <param name="row">Filled.</param>
    public void CopyRow(int sample, Span<byte> row)
    {
        var size = _header.SampleBytes;
        var from = sample * size;
        for (var to = 0; to < row.Length; to += size, from += _most * size)
        {
            row[to] = _bytes[from];
            row[to + 1] = _bytes[from + 1];
            if (size == 3) row[to + 2] = _bytes[from + 2];
        }
    }
}
