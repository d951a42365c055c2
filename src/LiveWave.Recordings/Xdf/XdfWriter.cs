using System.Buffers.Binary;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Writes a recording in XDF 1.0 that can be read up to its last half second, whatever ends the process.</summary>
/// <remarks>
/// <para>All headers come first. Samples go out in chunks of half a second, each built in memory and handed to the system in one piece, its
/// first stamp explicit, further ones only where they are off the sampling grid by a microsecond or more. A place to begin anew every ten
/// seconds, with a flush to the medium. Clock offsets of 0 at the start, every five seconds and at the end: stamps are the recorder's own
/// clock. Footers last. All of this goes by stamps: the same samples give the same bytes.</para>
/// <para>One thread. Integers are rounded, and held within their range; NaN becomes 0 in integers.</para>
/// </remarks>
public sealed class XdfWriter : IDisposable
{
    private const double ChunkSeconds = 0.5;
    private const double BoundarySeconds = 10;
    private const double OffsetSeconds = 5;

    private readonly FileStream _file;
    private readonly XdfStreamDraft[] _streams;
    private double _boundary = double.NaN;
    private double _offset = double.NaN;
    private double _newest = double.NegativeInfinity;
    private bool _isClosed;

    /// <summary>Makes the file and writes all headers.</summary>
    /// <param name="path">A file that is not there yet, in a folder that is.</param>
    /// <param name="streams">At least one; they are numbered from 0 here.</param>
    /// <exception cref="RefusedException">The file exists, or can't be made there.</exception>
    public XdfWriter(string path, IReadOnlyList<XdfStreamHead> streams)
    {
        ArgumentNullException.ThrowIfNull(streams);
        ArgumentOutOfRangeException.ThrowIfZero(streams.Count, nameof(streams));
        var headers = streams.Select(XdfXml.StreamHeader).ToArray();
        _streams = [.. streams.Select((head, i) => new XdfStreamDraft((uint)i + 1, head))];
        _file = Created(path);
        _file.Write("XDF:"u8);
        WriteChunk(XdfTag.FileHeader, null, XdfXml.FileHeader());
        for (var i = 0; i < headers.Length; i++) WriteChunk(XdfTag.StreamHeader, _streams[i].Id, headers[i]);
        _file.Flush(flushToDisk: true);
    }

    /// <summary>Adds a row.</summary>
    /// <param name="stream">The stream's number.</param>
    /// <param name="stampSeconds">Its stamp, never before the stream's last one.</param>
    /// <param name="row">Physical values, one a channel.</param>
    /// <exception cref="ArgumentException">The row is not as long as the stream has channels.</exception>
    public void Append(int stream, double stampSeconds, ReadOnlySpan<double> row)
    {
        var draft = _streams[stream];
        if (row.Length != draft.Head.Channels.Count || draft.Head.Wire is null)
        {
            throw new ArgumentException($"{row.Length} numbers for a stream of {draft.Head.Channels.Count} channels", nameof(row));
        }

        Turn(stampSeconds);
        draft.Add(stampSeconds, row);
    }

    /// <summary>Adds a marker.</summary>
    /// <param name="stream">The number of a stream of texts.</param>
    /// <param name="stampSeconds">Its stamp.</param>
    /// <param name="text">What it says.</param>
    public void Append(int stream, double stampSeconds, string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        if (_streams[stream].Head.Wire is not null) throw new ArgumentException("the stream holds numbers", nameof(stream));
        Turn(stampSeconds);
        _streams[stream].Add(stampSeconds, text);
    }

    /// <summary>Writes what is left and the footers, and closes the file.</summary>
    public void Dispose()
    {
        if (_isClosed) return;
        _isClosed = true;
        WriteSamples();
        if (_newest > _offset) WriteOffsets(_newest);
        foreach (var stream in _streams)
        {
            if (stream.Count == 0) continue;
            WriteChunk(XdfTag.StreamFooter, stream.Id, XdfXml.StreamFooter(stream.FirstStamp, stream.LastStamp, stream.Count, stream.Offsets));
        }

        _file.Flush(flushToDisk: true);
        _file.Dispose();
    }

    private static FileStream Created(string path)
    {
        try
        {
            return new FileStream(path, FileMode.CreateNew, FileAccess.Write, FileShare.Read);
        }
        catch (IOException e) when (File.Exists(path))
        {
            throw new RefusedException("the file is there already", path, "give another name: nothing is overwritten", e);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw new RefusedException("the file can't be made", path, e.Message, e);
        }
    }

    /// <summary>What is due before a sample of this stamp.</summary>
    private void Turn(double stamp)
    {
        if (double.IsNaN(_boundary))
        {
            _boundary = stamp;
            WriteOffsets(stamp);
        }

        _newest = Math.Max(_newest, stamp);
        var oldest = double.PositiveInfinity;
        foreach (var stream in _streams)
        {
            if (stream.InChunk > 0) oldest = Math.Min(oldest, stream.ChunkStamp);
        }

        // Half a microsecond: stamps are sums, and 0.5 s may come out as a little less.
        if (stamp - oldest < ChunkSeconds - 5e-7) return;
        WriteSamples();
        if (stamp - _offset >= OffsetSeconds) WriteOffsets(stamp);
        if (stamp - _boundary >= BoundarySeconds)
        {
            _boundary = stamp;
            WriteChunk(XdfTag.Boundary, null, XdfLayout.Signature);
            _file.Flush(flushToDisk: true);
        }
        else
        {
            _file.Flush();
        }
    }

    private void WriteSamples()
    {
        Span<byte> count = stackalloc byte[5];
        count[0] = 4;
        foreach (var stream in _streams)
        {
            if (stream.InChunk == 0) continue;
            BinaryPrimitives.WriteUInt32LittleEndian(count[1..], stream.InChunk);
            WriteChunk(XdfTag.Samples, stream.Id, count, stream.Chunk);
            stream.Clear();
        }
    }

    private void WriteOffsets(double time)
    {
        _offset = time;
        Span<byte> content = stackalloc byte[16];
        BinaryPrimitives.WriteDoubleLittleEndian(content, time);
        BinaryPrimitives.WriteDoubleLittleEndian(content[8..], 0);
        foreach (var stream in _streams)
        {
            WriteChunk(XdfTag.ClockOffset, stream.Id, content);
            stream.NoteOffset(time, 0);
        }
    }

    private void WriteChunk(XdfTag tag, uint? stream, ReadOnlySpan<byte> content, ReadOnlySpan<byte> more = default)
    {
        var length = sizeof(ushort) + (stream is null ? 0 : sizeof(uint)) + content.Length + more.Length;
        var bytes = new byte[5 + length];
        bytes[0] = 4;
        BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(1), (uint)length);
        BinaryPrimitives.WriteUInt16LittleEndian(bytes.AsSpan(5), (ushort)tag);
        var at = 7;
        if (stream is { } id)
        {
            BinaryPrimitives.WriteUInt32LittleEndian(bytes.AsSpan(at), id);
            at += sizeof(uint);
        }

        content.CopyTo(bytes.AsSpan(at));
        more.CopyTo(bytes.AsSpan(at + content.Length));
        _file.Write(bytes);
    }
}
