using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Compares what an EDF header promises with the length of the file.</summary>
internal static class EdfExtent
{
    private const int LookedBytes = 1 << 16;
    private const int TellingCount = 8;

    /// <summary>Counts the whole data records that can be read.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    /// <param name="header">Its header.</param>
    /// <param name="promised">Records as the header says; −1: not known when it was written.</param>
    /// <param name="promisedAt">Where it says so.</param>
    /// <param name="warnings">Told where the two differ.</param>
    /// <exception cref="RefusedException">A transfer as text has changed the bytes.</exception>
    public static long Records(FileWindow window, string path, EdfHeader header, long promised, long promisedAt, ReadWarnings warnings)
    {
        if (header.RecordBytes == 0) return 0;
        var held = (window.Length - header.HeaderBytes) / header.RecordBytes;
        if (promised < 0 || window.Length != header.RecordStart(promised)) RefuseTextTransfer(window, path);
        if (promised < 0) warnings.Add(promisedAt, "the number of data records was never written (-1): was the recording cut off?", $"the file holds {held}");
        if (promised > held) warnings.Add(promisedAt, $"the header says {promised} data records", $"the file holds {held}");
        var records = promised < 0 ? held : Math.Min(promised, held);
        var end = header.RecordStart(records);
        if (window.Length == end) return records;
        var what = records == held ? "the last data record is incomplete" : "the file goes on behind its last data record";
        warnings.Add(end, what, window.Length - end);
        return records;
    }

    // Binary data hold a line feed in every 256 bytes or so, hardly ever behind a carriage return.
    private static void RefuseTextTransfer(FileWindow window, string path)
    {
        var bytes = window.Copy(0, (int)Math.Min(window.Length, LookedBytes)).AsSpan();
        var lineFeeds = 0;
        var afterReturn = 0;
        for (var i = 1; i < bytes.Length; i++)
        {
            if (bytes[i] != '\n') continue;
            lineFeeds++;
            if (bytes[i - 1] == '\r') afterReturn++;
        }

        if (lineFeeds >= TellingCount && afterReturn == lineFeeds)
        {
            throw new RefusedException(
                $"a transfer as text has put a carriage return before every line feed ({lineFeeds} in the first {bytes.Length} bytes)",
                $"{path}, byte {bytes.IndexOf("\r\n"u8)}",
                "copy the original again, as binary");
        }

        ReadOnlySpan<byte> replacement = [0xEF, 0xBF, 0xBD];
        if (bytes.Count(replacement) < TellingCount || bytes.Count((byte)0xEF) != bytes.Count(replacement)) return;
        throw new RefusedException(
            $"a transfer as text has replaced bytes by EF BF BD ({bytes.Count(replacement)} in the first {bytes.Length} bytes)",
            $"{path}, byte {bytes.IndexOf(replacement)}",
            "copy the original again, as binary");
    }
}
