using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Tells by its first bytes what a file is.</summary>
internal static class FileKind
{
    private const int Looked = 8;

    // Prescribed by the format: FF and seven letters.
    private static ReadOnlySpan<byte> BdfVersion => [0xFF, 0x42, 0x49, 0x4F, 0x53, 0x45, 0x4D, 0x49];

    /// <summary>Tells the kinds that are read apart, and says of everything else what it seems to be.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    /// <exception cref="RefusedException">The file is of no kind that is read.</exception>
    public static RecordingKind Tell(FileWindow window, string path)
    {
        var first = window.Peek(0, Looked);
        if (first.StartsWith("XDF:"u8)) return RecordingKind.Xdf;
        if (first.SequenceEqual("0       "u8)) return RecordingKind.Edf;
        if (first.SequenceEqual(BdfVersion)) return RecordingKind.Bdf;
        if (first.IsEmpty) throw new RefusedException("the file is empty", path, "give a recording");
        throw new RefusedException($"not a recording that can be read: its first bytes are {Shown(first)}", path, Advice(first));
    }

    private static string Advice(ReadOnlySpan<byte> first)
    {
        if (first.StartsWith((ReadOnlySpan<byte>)[0x1F, 0x8B])) return "it is compressed (gzip): unpack it first";
        if (first.StartsWith((ReadOnlySpan<byte>)[0xEF, 0xBF, 0xBD]))
        {
            return "a transfer as text has replaced bytes (EF BF BD): copy the original again, as binary";
        }

        if (first.StartsWith((ReadOnlySpan<byte>)[0x89, 0x48, 0x44, 0x46]))
        {
            return "it looks like HDF5 or NWB, which can't be read yet: give a recording in XDF, EDF or BDF";
        }

        return "give a recording in XDF, EDF or BDF; XDF begins with 'XDF:', EDF with '0' and seven blanks, BDF with FF";
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
