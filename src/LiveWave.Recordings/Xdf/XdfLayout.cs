using System.Buffers.Binary;

namespace LiveWave.Recordings;

/// <summary>The grammar of XDF 1.0 on a file that may be damaged: reads frames, and says whether one looks sound. Nothing here
/// trusts a number of the file before it is compared with what is left of it.</summary>
/// <param name="window">The file.</param>
/// <param name="streams">The streams known so far, by number; may grow.</param>
internal sealed class XdfLayout(FileWindow window, IReadOnlyDictionary<uint, XdfStream> streams)
{
    private const int LongestNumber = 9;

    /// <summary>Sixteen bytes that mark a place where reading can begin anew.</summary>
    public static ReadOnlySpan<byte> Signature =>
        [0x43, 0xA5, 0x46, 0xDC, 0xCB, 0xF5, 0x41, 0x0F, 0xB3, 0x0E, 0xD5, 0x46, 0x73, 0x83, 0xCB, 0xE4];

    /// <summary>Reads the frame of the chunk at a place.</summary>
    /// <param name="position">Its first byte, before the end of the file.</param>
    /// <param name="chunk">Where it lies; in a cut chunk <see cref="XdfChunk.IsCut"/> is set.</param>
    /// <returns>What is wrong with it, or null. Where the frame can't be read at all, <paramref name="chunk"/> is empty.</returns>
    public string? Frame(long position, out XdfChunk chunk)
    {
        chunk = default;
        if (!TryNumber(position, window.Length, out var length, out var content))
        {
            return window.Peek(position, 1) is [1 or 4 or 8] ? "the file ends inside the length of a chunk" : "this is no length of a chunk";
        }

        if (length < 2) return $"a chunk of {length} bytes";
        if (window.Length - content < 2) return "the file ends inside a chunk";
        var tag = (XdfTag)BinaryPrimitives.ReadUInt16LittleEndian(window.Peek(content, 2));
        var left = (ulong)(window.Length - content);
        if (length <= left)
        {
            var end = content + (long)length;
            chunk = new XdfChunk(position, tag, content + 2, end, end);
            return null;
        }

        if (length < long.MaxValue / 2) chunk = new XdfChunk(position, tag, content + 2, content + (long)length, window.Length);
        return $"a chunk reaches {length - left} bytes beyond the end of the file";
    }

    /// <summary>Reads a number with its own length in front.</summary>
    /// <param name="position">Of the length byte.</param>
    /// <param name="end">First byte that doesn't belong to it any more.</param>
    /// <param name="value">The number.</param>
    /// <param name="next">First byte behind it.</param>
    /// <returns>False if it is not a number of the standard, or not whole.</returns>
    public bool TryNumber(long position, long end, out ulong value, out long next)
    {
        value = 0;
        next = position;
        var bytes = window.Peek(position, (int)Math.Clamp(end - position, 0, LongestNumber));
        if (bytes.IsEmpty || bytes[0] is not (1 or 4 or 8) || bytes.Length <= bytes[0]) return false;
        value = bytes[0] switch
        {
            1 => bytes[1],
            4 => BinaryPrimitives.ReadUInt32LittleEndian(bytes[1..]),
            _ => BinaryPrimitives.ReadUInt64LittleEndian(bytes[1..]),
        };
        next = position + 1 + bytes[0];
        return true;
    }

    /// <summary>Reads which stream a chunk belongs to.</summary>
    /// <param name="chunk">A chunk of a kind that has a stream.</param>
    /// <param name="id">The stream's number.</param>
    /// <returns>False if the chunk is too short to have one.</returns>
    public bool TryStream(in XdfChunk chunk, out uint id)
    {
        id = 0;
        if (chunk.End - chunk.Content < sizeof(uint)) return false;
        var bytes = window.Peek(chunk.Content, sizeof(uint));
        return bytes.Length == sizeof(uint) && BinaryPrimitives.TryReadUInt32LittleEndian(bytes, out id);
    }

    /// <summary>Tells if the number of samples in a chunk fits its length and its stream.</summary>
    /// <param name="chunk">A chunk of samples.</param>
    /// <param name="stream">Its stream.</param>
    /// <param name="samples">How many.</param>
    /// <param name="first">Where the first one begins.</param>
    public bool TrySamples(in XdfChunk chunk, XdfStream stream, out ulong samples, out long first) =>
        TryNumber(chunk.Content + sizeof(uint), chunk.End, out samples, out first) && stream.CanHold(samples, chunk.DeclaredEnd - first);

    /// <summary>Tells if a chunk is what its kind and stream ask for. A chunk of an unknown kind, or of samples of an unknown
    /// stream, isn't.</summary>
    /// <param name="chunk">A chunk.</param>
    public bool Fits(in XdfChunk chunk)
    {
        var bytes = chunk.DeclaredEnd - chunk.Content;
        switch (chunk.Tag)
        {
            case XdfTag.FileHeader:
                return LooksLikeXml(chunk.Content, chunk.End);
            case XdfTag.Boundary:
                return bytes == Signature.Length && window.Peek(chunk.Content, Signature.Length).SequenceEqual(Signature);
            case XdfTag.StreamHeader:
                return bytes > sizeof(uint) && LooksLikeXml(chunk.Content + sizeof(uint), chunk.End);
        }

        if (!TryStream(chunk, out var id) || !streams.TryGetValue(id, out var stream)) return false;
        return chunk.Tag switch
        {
            XdfTag.Samples => TrySamples(chunk, stream, out _, out _),
            XdfTag.ClockOffset => bytes == sizeof(uint) + (2 * sizeof(double)),
            XdfTag.StreamFooter => LooksLikeXml(chunk.Content + sizeof(uint), chunk.End),
            _ => false,
        };
    }

    /// <summary>Tells if reading can go on at a place: the end, a chunk that fits, or one of a stream whose header was lost or
    /// can't be read, with a chunk of a known kind behind it.</summary>
    /// <param name="position">The place.</param>
    public bool LooksSound(long position)
    {
        if (position == window.Length) return true;
        if (Frame(position, out var chunk) is not null) return false;
        if (Fits(chunk)) return true;
        if (chunk.Tag is not (XdfTag.Samples or XdfTag.ClockOffset or XdfTag.StreamFooter)) return false;
        if (!TryStream(chunk, out var id) || (streams.TryGetValue(id, out var stream) && stream.IsReadable)) return false;
        return chunk.End == window.Length
            || (Frame(chunk.End, out var next) is null && next.Tag is >= XdfTag.FileHeader and <= XdfTag.StreamFooter);
    }

    /// <summary>Searches forward for the mark of a boundary, once through the file at most.</summary>
    /// <param name="from">Where to begin.</param>
    /// <returns>The first byte behind the mark, or −1.</returns>
    public long AfterNextSignature(long from)
    {
        while (from <= window.Length - Signature.Length)
        {
            var bytes = window.Peek(from, window.Size);
            if (bytes.Length < Signature.Length) return -1;      // the file became shorter while it was read
            var at = bytes.IndexOf(Signature);
            if (at >= 0) return from + at + Signature.Length;
            from += bytes.Length - Signature.Length + 1;
        }

        return -1;
    }

    private bool LooksLikeXml(long from, long end)
    {
        var bytes = window.Peek(from, (int)Math.Clamp(end - from, 0, 64));
        if (bytes.StartsWith((ReadOnlySpan<byte>)[0xEF, 0xBB, 0xBF])) bytes = bytes[3..];
        var text = bytes.TrimStart(" \t\r\n"u8);
        return !text.IsEmpty && text[0] == (byte)'<';
    }
}
