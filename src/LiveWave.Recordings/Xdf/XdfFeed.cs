using System.Buffers.Binary;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads one regular stream of numbers from an XDF file, row by row.</summary>
/// <remarks>
/// <para>Values are the numbers of the file times their channel's conversion; the wire bytes of a block are those numbers as they
/// lie in the file, sample by sample, without stamps. A sample without a stamp of its own has the one before plus one nominal
/// period, as the standard says. A clock offset is delivered as a measurement known from the row behind it; those behind the last
/// row are not delivered. Its uncertainty is NaN, since the file doesn't tell.</para>
/// <para>After damage, rows are left out until one has its own stamp: the stamp they would be given would hide the loss. A second
/// header that changes nothing about the samples is a restart; one that changes their form ends the stream.</para>
/// <para>Memory is bounded whatever the file says; nothing is allocated while sound chunks are read.</para>
/// </remarks>
public sealed class XdfFeed : RecordingFeed
{
    private const int MostPending = 256;

    private readonly XdfStream _stream;
    private readonly FileWindow _window;
    private readonly ReadWarnings _warnings;
    private readonly XdfLayout _layout;
    private readonly XdfWalk _walk;
    private readonly RowDecoder _decoder;
    private readonly XdfRows _rows;
    private readonly double _periodSeconds;
    private readonly Queue<ClockMeasurement> _pending = new(MostPending);

    private long _values;
    private bool _isReady;
    private bool _isOver;
    private bool _beginsAnew;
    private bool _isStampKnown = true;
    private double _stampSeconds;
    private long _leftOut;
    private long _received;
    private int _lossesSeen;
    private bool _isDisposed;

    /// <summary>Opens a stream.</summary>
    /// <param name="path">The file.</param>
    /// <param name="stream">A regular stream of numbers of it.</param>
    /// <param name="streams">All its streams.</param>
    internal XdfFeed(string path, XdfStream stream, IReadOnlyDictionary<uint, XdfStream> streams)
        : this(path, stream, streams, new ReadWarnings(path))
    {
    }

    private XdfFeed(string path, XdfStream stream, IReadOnlyDictionary<uint, XdfStream> streams, ReadWarnings warnings)
        : base(stream.Described, stream.Described.ToFormat(warnings))
    {
        _stream = stream;
        _warnings = warnings;
        _decoder = new RowDecoder(Format);
        _periodSeconds = 1 / Format.NominalRateHz;
        _window = FileWindow.Open(path, Math.Max(FileWindow.ReadBytes, 1 + sizeof(double) + _decoder.RowBytes));
        _layout = new XdfLayout(_window, streams);
        _walk = new XdfWalk(_window, _layout, warnings);
        _rows = new XdfRows(_window, _decoder.RowBytes);
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
        while (into.Count < into.Capacity && FindRow())
        {
            if (_beginsAnew)
            {
                if (into.Count > 0) break;
                into.Begin(_received, afterRestart: true);
                _beginsAnew = false;
            }

            Append(into);
        }

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
        var bytes = _window.Peek(_values, _decoder.RowBytes);
        if (bytes.Length == _decoder.RowBytes)
        {
            _decoder.Decode(bytes, into.Append(_stampSeconds));
            into.AppendWire(bytes);
            while (_pending.TryDequeue(out var measurement)) into.AppendClock(measurement);
            _received++;
        }
        else
        {
            _isOver = true;      // the file became shorter while it was read
        }

        _isReady = false;
    }

    // Stands on the values of the next row, its stamp known. Called again before the row was taken it stays there.
    private bool FindRow()
    {
        while (!_isReady)
        {
            if (_rows.TryTake(out var own, out _values))
            {
                TakeStamp(own);
                continue;
            }

            if (_isOver || !_walk.TryNext(out var chunk))
            {
                _isOver = true;
                TellLeftOut();
                return false;
            }

            if (_walk.Losses != _lossesSeen) _isStampKnown = false;
            _lossesSeen = _walk.Losses;
            Enter(chunk);
        }

        return true;
    }

    private void TakeStamp(double? own)
    {
        if (own is { } stamp)
        {
            _stampSeconds = stamp;
            _isStampKnown = double.IsFinite(stamp);
            if (_isStampKnown) TellLeftOut();
        }
        else
        {
            _stampSeconds += _periodSeconds;
        }

        _isReady = _isStampKnown;
        if (!_isReady) _leftOut++;
    }

    private void Enter(in XdfChunk chunk)
    {
        if (chunk.Tag == XdfTag.FileHeader) return;
        if (chunk.Tag is < XdfTag.StreamHeader or > XdfTag.StreamFooter || !_layout.TryStream(chunk, out var id)) return;
        if (id != _stream.Id)
        {
            if (_layout.Fits(chunk)) _walk.Confirm(chunk);
            return;
        }

        if (chunk.Tag == XdfTag.Samples) EnterSamples(chunk);
        else if (chunk.Tag == XdfTag.ClockOffset) TakeClock(chunk);
        else if (chunk.Tag == XdfTag.StreamHeader) TakeHeader(chunk);
        else _walk.Confirm(chunk);
    }

    private void EnterSamples(in XdfChunk chunk)
    {
        if (!_layout.TrySamples(chunk, _stream, out var samples, out var first))
        {
            _isStampKnown = false;
            _walk.Reject(chunk, chunk.Start, "the number of samples doesn't fit the length of the chunk");
            return;
        }

        var flaw = _rows.Enter(chunk, first, samples);
        if (flaw is null)
        {
            _walk.Confirm(chunk);
            return;
        }

        _isStampKnown = false;
        _walk.Reject(chunk, chunk.Start, flaw);
    }

    private void TakeClock(in XdfChunk chunk)
    {
        if (!_layout.Fits(chunk))
        {
            _walk.Reject(chunk, chunk.Start, "a clock offset of another length");
            return;
        }

        _walk.Confirm(chunk);
        var bytes = _window.Peek(chunk.Content + sizeof(uint), 2 * sizeof(double));
        if (bytes.Length < 2 * sizeof(double)) return;
        var remote = BinaryPrimitives.ReadDoubleLittleEndian(bytes);
        var offset = BinaryPrimitives.ReadDoubleLittleEndian(bytes[sizeof(double)..]);
        if (!double.IsFinite(remote) || !double.IsFinite(offset))
        {
            _warnings.Add(chunk.Start, "a clock offset that is not a number is left out", 0);
            return;
        }

        if (_pending.Count == MostPending)
        {
            _pending.Dequeue();
            _warnings.Add(chunk.Start, $"more than {MostPending} clock offsets between two rows: the oldest is left out", 0);
        }

        _pending.Enqueue(new ClockMeasurement(_received, remote + offset, remote, offset, double.NaN));
    }

    private void TakeHeader(in XdfChunk chunk)
    {
        if (!_layout.Fits(chunk))
        {
            _walk.Reject(chunk, chunk.Start, "a stream header without a description");
            return;
        }

        _walk.Confirm(chunk);
        var now = XdfStream.Read(_window, chunk, _stream.Id);
        if (now.Print == _stream.Print) return;
        if (IsSameForm(now.Described, Stream))
        {
            _beginsAnew = true;
            return;
        }

        _warnings.Add(chunk.Start, "the stream changes its form: nothing behind this place is read", _window.Length - chunk.Start);
        _isOver = true;
    }

    private static bool IsSameForm(StreamDescription a, StreamDescription b) =>
        a.Problem.Length == 0 && a.Wire == b.Wire && a.ChannelCount == b.ChannelCount
        && a.NominalRateHz.Equals(b.NominalRateHz) && a.Channels.SequenceEqual(b.Channels);

    private void TellLeftOut()
    {
        if (_leftOut == 0) return;
        _warnings.Add(_rows.Position, $"{_leftOut} rows before this place have no stamp, behind damage or a stamp that is no number, and are left out", 0);
        _leftOut = 0;
    }
}
