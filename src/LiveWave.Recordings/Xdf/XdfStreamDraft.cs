using System.Buffers;
using System.Buffers.Binary;
using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>One stream while it is written: the chunk that is being filled, and what its footer will say.</summary>
internal sealed class XdfStreamDraft(uint id, XdfStreamHead head)
{
    private const double SameInstantSeconds = 1e-6;
    private const byte Deduced = 0;
    private const byte Explicit = 8;

    private readonly ArrayBufferWriter<byte> _chunk = new();
    private readonly List<(double Time, double Value)> _offsets = [];
    private double _deduced;

    public uint Id => id;

    public XdfStreamHead Head => head;

    /// <summary>Samples in the chunk.</summary>
    public uint InChunk { get; private set; }

    /// <summary>Stamp of the chunk's first sample.</summary>
    public double ChunkStamp { get; private set; }

    /// <summary>Bytes of the chunk's samples.</summary>
    public ReadOnlySpan<byte> Chunk => _chunk.WrittenSpan;

    public double FirstStamp { get; private set; } = double.NaN;

    public double LastStamp { get; private set; } = double.NaN;

    public long Count { get; private set; }

    public IReadOnlyList<(double Time, double Value)> Offsets => _offsets;

    /// <summary>Adds a row of numbers in physical units.</summary>
    public void Add(double stamp, ReadOnlySpan<double> row)
    {
        Stamp(stamp);
        for (var i = 0; i < row.Length; i++) Put(row[i] / head.Channels[i].Conversion);
    }

    /// <summary>Adds a text.</summary>
    public void Add(double stamp, string text)
    {
        Stamp(stamp);
        var bytes = Encoding.UTF8.GetBytes(text);
        Span<byte> length = stackalloc byte[5];
        length[0] = 4;
        BinaryPrimitives.WriteUInt32LittleEndian(length[1..], (uint)bytes.Length);
        _chunk.Write(length);
        _chunk.Write(bytes);
    }

    public void NoteOffset(double time, double value) => _offsets.Add((time, value));

    /// <summary>Begins the next chunk.</summary>
    public void Clear()
    {
        _chunk.ResetWrittenCount();
        InChunk = 0;
    }

    private void Stamp(double stamp)
    {
        if (InChunk == 0) ChunkStamp = stamp;
        if (Count == 0) FirstStamp = stamp;
        LastStamp = stamp;
        Count++;
        _deduced += head.RateHz > 0 ? 1 / head.RateHz : 0;

        // The first of a chunk carries its own, so that a chunk stands alone after damage elsewhere.
        if (InChunk++ > 0 && head.RateHz > 0 && Math.Abs(stamp - _deduced) < SameInstantSeconds)
        {
            _chunk.Write([Deduced]);
            return;
        }

        _deduced = stamp;
        _chunk.Write([Explicit]);
        Span<byte> bytes = stackalloc byte[sizeof(double)];
        BinaryPrimitives.WriteDoubleLittleEndian(bytes, stamp);
        _chunk.Write(bytes);
    }

    private void Put(double number)
    {
        Span<byte> bytes = stackalloc byte[sizeof(double)];
        var size = head.Wire switch
        {
            WireFormat.Float32 => sizeof(float),
            WireFormat.Int8 => sizeof(sbyte),
            WireFormat.Int16 => sizeof(short),
            WireFormat.Int32 => sizeof(int),
            _ => sizeof(double),
        };
        switch (head.Wire)
        {
            case WireFormat.Float32:
                BinaryPrimitives.WriteSingleLittleEndian(bytes, (float)number);
                break;
            case WireFormat.Float64:
                BinaryPrimitives.WriteDoubleLittleEndian(bytes, number);
                break;
            default:
                BinaryPrimitives.WriteInt64LittleEndian(bytes, Whole(number, size));
                break;
        }

        _chunk.Write(bytes[..size]);
    }

    // Two's complement, low byte first: the low bytes of the longer number are the shorter one.
    private static long Whole(double number, int size)
    {
        if (size == sizeof(long)) return (long)Math.Round(number);
        var most = (1L << ((8 * size) - 1)) - 1;
        return (long)Math.Clamp(Math.Round(number), -most - 1, most);
    }
}
