using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Tells by its first bytes what a file is.</summary>
internal static class FileKind
{
    private const int Looked = 8;

    /// <summary>Lets XDF pass and says of everything else what it seems to be.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    /// <exception cref="RefusedException">The file is not XDF.</exception>
    public static void RequireXdf(FileWindow window, string path)
    {
        var first = window.Peek(0, Looked);
        if (first.StartsWith("XDF:"u8)) return;
        if (first.IsEmpty) throw new RefusedException("the file is empty", path, "give a recording");
        throw new RefusedException($"not an XDF file: its first bytes are {Shown(first)}", path, Advice(first));
    }

    private static string Advice(ReadOnlySpan<byte> first)
    {
        if (first.StartsWith((ReadOnlySpan<byte>)[0x1F, 0x8B])) return "it is compressed (gzip): unpack it first";
        if (first.SequenceEqual("0       "u8)) return "it looks like EDF, which can't be read yet: give an XDF recording";
        if (first[0] == 0xFF) return "it looks like BDF, which can't be read yet: give an XDF recording";
        if (first.StartsWith((ReadOnlySpan<byte>)[0x89, 0x48, 0x44, 0x46]))
        {
            return "it looks like HDF5 or NWB, which can't be read yet: give an XDF recording";
        }

        return "give an XDF recording, which begins with 'XDF:'";
    }

    private static string Shown(ReadOnlySpan<byte> bytes)
    {
        var hex = new StringBuilder();
        foreach (var one in bytes) hex.Append(one.ToString("X2", null)).Append(' ');
        var letters = new StringBuilder();
        foreach (var one in bytes) letters.Append(one is >= 0x20 and < 0x7F ? (char)one : '.');
        return $"{hex.ToString().TrimEnd()} ('{letters}')";
    }
}
