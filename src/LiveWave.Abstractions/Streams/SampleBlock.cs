namespace LiveWave.Abstractions;

/// <summary>What one pull delivered: rows in physical units (NaN = missing), one raw stamp a row, the wire bytes, and the clock
/// measurements that became known with it. May span a gap.</summary>
/// <remarks>Lent: a feed fills it, nobody changes it afterwards, and it is valid until the next pull. Allocates when made, and
/// later only if a feed delivers more wire bytes or clock measurements than ever before.</remarks>
public sealed class SampleBlock
{
    private readonly double[] _values;
    private readonly double[] _rawStamps;
    private readonly int _rowLength;
    private byte[] _wire;
    private int _wireCount;
    private ClockMeasurement[] _clock = new ClockMeasurement[4];
    private int _clockCount;

    /// <summary>Makes an empty block.</summary>
    /// <param name="format">The stream.</param>
    /// <param name="capacityRows">Most rows a pull may deliver, at least 1.</param>
    public SampleBlock(StreamFormat format, int capacityRows)
    {
        ArgumentNullException.ThrowIfNull(format);
        ArgumentOutOfRangeException.ThrowIfLessThan(capacityRows, 1);
        Format = format;
        Capacity = capacityRows;
        _rowLength = RowLength.Padded(format.ChannelCount);
        _values = new double[capacityRows * _rowLength];
        _rawStamps = new double[capacityRows];
        _wire = new byte[capacityRows * format.ChannelCount * sizeof(double)];
    }

    /// <summary>The stream.</summary>
    public StreamFormat Format { get; }

    /// <summary>Most rows a pull may deliver.</summary>
    public int Capacity { get; }

    /// <summary>Rows delivered.</summary>
    public int Count { get; private set; }

    /// <summary>Number of the first row, counted by the feed from 0 over the whole run.</summary>
    public long FirstReceived { get; private set; }

    /// <summary>The stream began anew just before the first row (another outlet with the same source id, say).</summary>
    public bool AfterRestart { get; private set; }

    /// <summary>Our clock when the pull returned, in seconds; set by the host.</summary>
    public double ReceivedSeconds { get; private set; }

    /// <summary>Wire bytes as received, in arrival order; empty where a feed has none.</summary>
    public ReadOnlySpan<byte> Wire => _wire.AsSpan(0, _wireCount);

    /// <summary>Clock measurements that became known with this block.</summary>
    public ReadOnlySpan<ClockMeasurement> ClockMeasurements => _clock.AsSpan(0, _clockCount);

    /// <summary>One row in physical units, NaN where a channel is missing.</summary>
    /// <param name="row">0 to <see cref="Count"/> − 1.</param>
    /// <returns><see cref="StreamFormat.ChannelCount"/> values.</returns>
    public ReadOnlySpan<double> Row(int row) => _values.AsSpan(row * _rowLength, Format.ChannelCount);

    /// <summary>The stamp of one row as the stream gave it, uncorrected, in seconds of the stream's clock.</summary>
    /// <param name="row">0 to <see cref="Count"/> − 1.</param>
    public double RawStampSeconds(int row) => _rawStamps[row];

    /// <summary>Feed: empties the block for the next pull.</summary>
    /// <param name="firstReceived">Number of the next row.</param>
    /// <param name="afterRestart">The stream began anew just before it.</param>
    public void Begin(long firstReceived, bool afterRestart = false)
    {
        Count = 0;
        _wireCount = 0;
        _clockCount = 0;
        FirstReceived = firstReceived;
        AfterRestart = afterRestart;
    }

    /// <summary>Feed: adds a row and returns the place for its values, which the feed must fill.</summary>
    /// <param name="rawStampSeconds">The stream's own stamp.</param>
    /// <exception cref="InvalidOperationException">The block is full.</exception>
    public Span<double> Append(double rawStampSeconds)
    {
        if (Count == Capacity) throw new InvalidOperationException($"the block is full: {Capacity} rows");
        _rawStamps[Count] = rawStampSeconds;
        return _values.AsSpan(Count++ * _rowLength, Format.ChannelCount);
    }

    /// <summary>Feed: adds wire bytes.</summary>
    /// <param name="bytes">As received.</param>
    public void AppendWire(ReadOnlySpan<byte> bytes)
    {
        if (_wireCount + bytes.Length > _wire.Length) Array.Resize(ref _wire, 2 * (_wireCount + bytes.Length));
        bytes.CopyTo(_wire.AsSpan(_wireCount));
        _wireCount += bytes.Length;
    }

    /// <summary>Feed: adds a clock measurement.</summary>
    /// <param name="measurement">Known from the first row of this block on.</param>
    public void AppendClock(in ClockMeasurement measurement)
    {
        if (_clockCount == _clock.Length) Array.Resize(ref _clock, 2 * _clockCount);
        _clock[_clockCount++] = measurement;
    }

    /// <summary>Host: notes when the pull returned.</summary>
    /// <param name="clockSeconds">Our clock.</param>
    public void StampReceived(double clockSeconds) => ReceivedSeconds = clockSeconds;

    /// <summary>Host, in tests: fills the rows with NaN, so that whoever kept the block fails at once.</summary>
    public void Poison() => _values.AsSpan().Fill(double.NaN);
}
