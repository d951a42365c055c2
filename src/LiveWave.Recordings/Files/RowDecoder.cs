using System.Buffers.Binary;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Turns little-endian numbers of a file into a row in physical units: number × scale + offset. NaN stays NaN.</summary>
internal sealed class RowDecoder
{
    private readonly WireFormat _wire;
    private readonly double[] _scale;
    private readonly double[]? _offset;

    /// <summary>Prepares for a stream. Allocates here and never again.</summary>
    /// <param name="format">The stream.</param>
    public RowDecoder(StreamFormat format)
    {
        _wire = format.Wire;
        _scale = [.. format.Channels.Select(channel => channel.Scale)];
        RowBytes = _scale.Length * SizeOf(_wire);
        if (format.Channels.Any(channel => channel.Offset != 0)) _offset = [.. format.Channels.Select(channel => channel.Offset)];
    }

    /// <summary>Bytes of one sample of all channels.</summary>
    public int RowBytes { get; }

    /// <summary>Bytes of one number.</summary>
    /// <param name="wire">Its form.</param>
    public static int SizeOf(WireFormat wire) => wire switch
    {
        WireFormat.Int8 => 1,
        WireFormat.Int16 => 2,
        WireFormat.Int24 => 3,
        WireFormat.Int32 or WireFormat.Float32 => 4,
        _ => 8,
    };

    /// <summary>Decodes one sample of all channels.</summary>
    /// <param name="bytes"><see cref="RowBytes"/> bytes.</param>
    /// <param name="row">One value a channel.</param>
    public void Decode(ReadOnlySpan<byte> bytes, Span<double> row)
    {
        switch (_wire)
        {
            case WireFormat.Float32:
                for (var i = 0; i < row.Length; i++) row[i] = BinaryPrimitives.ReadSingleLittleEndian(bytes[(4 * i)..]);
                break;
            case WireFormat.Float64:
                for (var i = 0; i < row.Length; i++) row[i] = BinaryPrimitives.ReadDoubleLittleEndian(bytes[(8 * i)..]);
                break;
            default:
                Whole(bytes, row);
                break;
        }

        for (var i = 0; i < row.Length; i++) row[i] *= _scale[i];
        if (_offset is null) return;
        for (var i = 0; i < row.Length; i++) row[i] += _offset[i];
    }

    private void Whole(ReadOnlySpan<byte> bytes, Span<double> row)
    {
        switch (_wire)
        {
            case WireFormat.Int8:
                for (var i = 0; i < row.Length; i++) row[i] = (sbyte)bytes[i];
                break;
            case WireFormat.Int16:
                for (var i = 0; i < row.Length; i++) row[i] = BinaryPrimitives.ReadInt16LittleEndian(bytes[(2 * i)..]);
                break;
            case WireFormat.Int24:
                for (var i = 0; i < row.Length; i++) row[i] = bytes[3 * i] | bytes[(3 * i) + 1] << 8 | (sbyte)bytes[(3 * i) + 2] << 16;
                break;
            case WireFormat.Int32:
                for (var i = 0; i < row.Length; i++) row[i] = BinaryPrimitives.ReadInt32LittleEndian(bytes[(4 * i)..]);
                break;
            default:
                for (var i = 0; i < row.Length; i++) row[i] = BinaryPrimitives.ReadInt64LittleEndian(bytes[(8 * i)..]);
                break;
        }
    }
}
