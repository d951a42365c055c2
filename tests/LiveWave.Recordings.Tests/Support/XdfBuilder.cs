using System.Buffers.Binary;
using System.Text;

namespace LiveWave.Recordings.Tests;

/// <summary>Writes XDF in memory, right or wrong, chunk by chunk.</summary>
internal sealed class XdfBuilder
{
    private readonly List<byte> _bytes = [.. "XDF:"u8];
    private readonly Dictionary<uint, string> _formats = [];

    public XdfBuilder() => Chunk(1, "<?xml version=\"1.0\"?><info><version>1.0</version></info>"u8);

    public int Length => _bytes.Count;

    public byte[] Bytes => [.. _bytes];

    public static ReadOnlySpan<byte> Signature =>
        [0x43, 0xA5, 0x46, 0xDC, 0xCB, 0xF5, 0x41, 0x0F, 0xB3, 0x0E, 0xD5, 0x46, 0x73, 0x83, 0xCB, 0xE4];

    public static string Header(string name, int channels, string rate, string format, string description = "", string type = "LFP") =>
        $"<?xml version=\"1.0\"?><info><name>{name}</name><type>{type}</type><channel_count>{channels}</channel_count>"
        + $"<nominal_srate>{rate}</nominal_srate><channel_format>{format}</channel_format><desc>{description}</desc></info>";

    public static string Channels(params string[] labels) =>
        "<channels>" + string.Concat(labels.Select(label => $"<channel><label>{label}</label><unit>microvolts</unit></channel>")) + "</channels>";

    public static string Numbered(int channels) => Channels([.. Enumerable.Range(1, channels).Select(i => "c" + i)]);

    public XdfBuilder Stream(uint id, string name, int channels, string rate, string format, string? description = null)
    {
        _formats[id] = format;
        return Text(2, id, Header(name, channels, rate, format, description ?? Numbered(channels)));
    }

    public XdfBuilder Text(ushort tag, uint id, string xml) => Chunk(tag, [.. Number(id), .. Encoding.UTF8.GetBytes(xml)]);

    public XdfBuilder Samples(uint id, params (double? Stamp, double[] Values)[] rows)
    {
        var content = new List<byte>([.. Number(id), 4, .. Number((uint)rows.Length)]);
        foreach (var (stamp, values) in rows)
        {
            content.Add(stamp is null ? (byte)0 : (byte)8);
            if (stamp is { } own) content.AddRange(Number(own));
            foreach (var value in values) content.AddRange(Value(_formats[id], value));
        }

        return Chunk(3, [.. content]);
    }

    public XdfBuilder Markers(uint id, params (double Stamp, string Text)[] markers)
    {
        var content = new List<byte>([.. Number(id), 1, (byte)markers.Length]);
        foreach (var (stamp, text) in markers)
        {
            var bytes = Encoding.UTF8.GetBytes(text);
            content.AddRange([8, .. Number(stamp), 1, (byte)bytes.Length, .. bytes]);
        }

        return Chunk(3, [.. content]);
    }

    public XdfBuilder Clock(uint id, double collectedSeconds, double offsetSeconds) =>
        Chunk(4, [.. Number(id), .. Number(collectedSeconds), .. Number(offsetSeconds)]);

    public XdfBuilder Boundary() => Chunk(5, Signature);

    public XdfBuilder Footer(uint id) => Text(6, id, "<?xml version=\"1.0\"?><info><sample_count>1</sample_count></info>");

    /// <summary>A chunk; its length in 4 bytes, or in 8 or 1 if so asked.</summary>
    public XdfBuilder Chunk(ushort tag, ReadOnlySpan<byte> content, int lengthBytes = 4)
    {
        Span<byte> length = stackalloc byte[8];
        BinaryPrimitives.WriteUInt64LittleEndian(length, (ulong)content.Length + 2);
        return Raw([(byte)lengthBytes, .. length[..lengthBytes], (byte)tag, (byte)(tag >> 8), .. content]);
    }

    public XdfBuilder Raw(ReadOnlySpan<byte> bytes)
    {
        _bytes.AddRange(bytes);
        return this;
    }

    public static byte[] Number(uint value) => BitConverter.GetBytes(value);

    public static byte[] Number(ulong value) => BitConverter.GetBytes(value);

    public static byte[] Number(double value) => BitConverter.GetBytes(value);

    private static byte[] Value(string format, double value) => format switch
    {
        "int8" => [(byte)(sbyte)value],
        "int16" => BitConverter.GetBytes((short)value),
        "int32" => BitConverter.GetBytes((int)value),
        "int64" => BitConverter.GetBytes((long)value),
        "float32" => BitConverter.GetBytes((float)value),
        _ => BitConverter.GetBytes(value),
    };
}
