using System.Buffers.Binary;

namespace LiveWave.Recordings;

/// <summary>The samples of one chunk of numbers, one after the other.</summary>
/// <remarks>A chunk is walked through before its first sample is given away: one wrong stamp byte shifts everything behind it, and
/// shifted values look like any others. So a chunk whose samples don't end where it ends gives none.</remarks>
/// <param name="window">The file.</param>
/// <param name="rowBytes">Bytes of the values of one sample.</param>
internal sealed class XdfRows(FileWindow window, int rowBytes)
{
    private const int StampBytes = sizeof(double);

    private long _position;
    private ulong _left;

    /// <summary>First byte behind what was taken.</summary>
    public long Position => _position;

    /// <summary>Enters a chunk.</summary>
    /// <param name="chunk">The chunk; of a cut one the whole samples are given.</param>
    /// <param name="first">Where the first sample begins.</param>
    /// <param name="count">Samples as the chunk says, compared with its length before.</param>
    /// <returns>What is wrong with the chunk, which then has no samples; or null.</returns>
    public string? Enter(in XdfChunk chunk, long first, ulong count)
    {
        _left = 0;
        _position = first;
        var at = first;
        var whole = 0UL;
        while (whole < count)
        {
            var head = window.Peek(at, 1);
            if (head.IsEmpty) break;
            if (head[0] is not (0 or StampBytes)) return $"a sample whose stamp has {head[0]} bytes instead of 0 or {StampBytes}";
            var next = at + 1 + head[0] + rowBytes;
            if (next > chunk.End) break;
            at = next;
            whole++;
        }

        if (!chunk.IsCut && whole < count) return "samples that reach beyond the end of their chunk";
        if (!chunk.IsCut && at != chunk.End) return "bytes left over behind the samples of a chunk";
        _left = whole;
        return null;
    }

    /// <summary>Takes the next sample.</summary>
    /// <param name="stampSeconds">Its stamp; null if it has none of its own.</param>
    /// <param name="values">Where its values begin.</param>
    /// <returns>False if the chunk is used up.</returns>
    public bool TryTake(out double? stampSeconds, out long values)
    {
        stampSeconds = null;
        values = _position;
        if (_left == 0) return false;
        var head = window.Peek(_position, 1 + StampBytes);
        if (head.Length <= head[0]) return false;      // the file became shorter while it was read
        if (head[0] == StampBytes) stampSeconds = BinaryPrimitives.ReadDoubleLittleEndian(head[1..]);
        values = _position + 1 + head[0];
        _position = values + rowBytes;
        _left--;
        return true;
    }
}
