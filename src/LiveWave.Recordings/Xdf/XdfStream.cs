using System.Security.Cryptography;

namespace LiveWave.Recordings;

/// <summary>One stream of an XDF file: its description and how large its samples can be.</summary>
/// <param name="Id">Its number in the file.</param>
/// <param name="Described">What its header says.</param>
/// <param name="Print">Hash of the header's text, to tell a repeated one from a changed one.</param>
internal sealed record XdfStream(uint Id, StreamDescription Described, string Print)
{
    /// <summary>The size of a sample is known.</summary>
    public bool IsReadable => Described.Problem.Length == 0;

    /// <summary>Reads a header.</summary>
    /// <param name="window">The file.</param>
    /// <param name="chunk">The header, longer than its stream's number.</param>
    /// <param name="id">That number.</param>
    public static XdfStream Read(FileWindow window, in XdfChunk chunk, uint id)
    {
        var from = chunk.Content + sizeof(uint);
        if (chunk.End - from > XdfDescription.MostBytes)
        {
            return new XdfStream(id, XdfDescription.Unread(id, $"its description is longer than {XdfDescription.MostBytes >> 20} MB"), "");
        }

        var bytes = window.Copy(from, (int)(chunk.End - from));
        var print = Convert.ToHexString(SHA256.HashData(bytes));
        return new XdfStream(id, XdfDescription.Read(id, XdfDescription.Text(bytes)), print);
    }

    /// <summary>Tells if so many samples can fill so many bytes: stamp byte, perhaps 8 bytes of stamp, then the values.</summary>
    /// <param name="samples">As the chunk says; may be any number in a damaged file.</param>
    /// <param name="bytes">Bytes of the chunk behind that number.</param>
    public bool CanHold(ulong samples, long bytes)
    {
        if (bytes < 0 || !IsReadable) return false;
        var isText = Described.Wire is null;
        var least = 1L + (Described.ChannelCount * (isText ? 2L : RowDecoder.SizeOf(Described.Wire!.Value)));
        if (samples > (ulong)(bytes / least)) return false;
        var rest = bytes - ((long)samples * least);
        return isText || (rest % sizeof(double) == 0 && rest / sizeof(double) <= (long)samples);
    }
}
