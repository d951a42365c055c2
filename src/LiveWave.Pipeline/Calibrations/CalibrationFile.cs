using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A calibration as <c>baseline</c> wrote it (JSON, version 1): per patch and band what was learnt, and what it holds for.</summary>
/// <remarks>Read at set-up. Everything is checked here once, so that nobody behind it meets a length that doesn't fit or a number
/// that isn't one. The format is described in this folder's README.</remarks>
public sealed class CalibrationFile
{
    /// <summary>The version of the format that is understood.</summary>
    public const int Version = 1;

    private const string Format = "livewave-calibration";
    private const long MostBytes = 256L << 20;      // a thousand channels in two bands are about 40 MB

    private CalibrationFile(string path, string madeBy, string provenance, IReadOnlyList<CalibrationEntry> entries)
    {
        Path = path;
        MadeBy = madeBy;
        Provenance = provenance;
        Entries = entries;
    }

    /// <summary>The file, as the user gave it.</summary>
    public string Path { get; }

    /// <summary>What made it; empty where not stated.</summary>
    public string MadeBy { get; }

    /// <summary>Where it comes from, a JSON object of the maker's own form; <c>{}</c> where not stated.</summary>
    public string Provenance { get; }

    /// <summary>One for each patch and band.</summary>
    public IReadOnlyList<CalibrationEntry> Entries { get; }

    /// <summary>Reads and checks a file.</summary>
    /// <param name="path">The file.</param>
    /// <exception cref="RefusedException">The file is missing, is not JSON (with line and byte), is of another format or version, or a
    /// value in it is missing, of the wrong kind, out of range or of a length that doesn't fit (with its JSON path).</exception>
    public static CalibrationFile Read(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        var bytes = Bytes(path);
        try
        {
            using var document = JsonDocument.Parse(bytes, new JsonDocumentOptions { AllowDuplicateProperties = false });
            return Read(new CalibrationNode(document.RootElement, path), path);
        }
        catch (JsonException error)
        {
            var where = error.LineNumber is { } line ? $"{path}, line {line + 1}, byte {error.BytePositionInLine + 1}" : path;
            throw new RefusedException("this is not sound JSON: " + Reason(error), where, "was the file cut off or edited by hand? make the calibration again", error);
        }
        catch (InvalidOperationException error)      // a text that is no Unicode is noticed only when it is taken
        {
            throw new RefusedException("a text in it is not Unicode", path, "make the calibration again", error);
        }
    }

    /// <summary>The entry for a patch and band, null if there is none.</summary>
    /// <param name="patch">The patch.</param>
    /// <param name="band">The band.</param>
    public CalibrationEntry? Find(string patch, string band) =>
        Entries.FirstOrDefault(entry => entry.Calibration.Patch == patch && entry.Calibration.Band == band);

    /// <summary>The entry for a patch and band, made for exactly what a run does.</summary>
    /// <param name="patch">The patch.</param>
    /// <param name="band">The band.</param>
    /// <param name="run">The run's own fingerprint.</param>
    /// <exception cref="RefusedException">There is no entry, or it was made for something else; the message names every difference.</exception>
    public CalibrationEntry Fitting(string patch, string band, CalibrationFingerprint run)
    {
        var where = $"{Path}, patch '{CalibrationNode.Plain(patch)}', band '{CalibrationNode.Plain(band)}'";
        if (Find(patch, band) is not { } entry)
        {
            var there = Entries.Select(one => $"'{CalibrationNode.Plain(one.Calibration.Patch)}' in '{CalibrationNode.Plain(one.Calibration.Band)}'");
            throw new RefusedException("the calibration holds nothing for it", where, "it holds " + string.Join(", ", there));
        }

        var differences = entry.Fingerprint.Differences(run);
        if (differences.Count == 0) return entry;
        throw new RefusedException(
            "the calibration was made for something else: " + string.Join("; ", differences), where, "undo the change, or make the calibration again");
    }

    private static CalibrationFile Read(CalibrationNode root, string path)
    {
        if (root["format"].Text() != Format)
        {
            throw root["format"].Refusal($"'{CalibrationNode.Plain(root["format"].Text())}' is another format", $"a calibration is '{Format}'");
        }

        var version = root["version"].Whole(0);
        if (version != Version)
        {
            throw root["version"].Refusal(
                $"version {version} is not understood, only {Version} is", "use the version of LiveWave that made it, or make the calibration again");
        }

        root.Knows("format", "version", "madeBy", "provenance", "entries");
        var entries = new List<CalibrationEntry>();
        foreach (var node in root["entries"].Items())
        {
            var entry = CalibrationReader.Entry(node);
            if (entries.Any(one => one.Calibration.Patch == entry.Calibration.Patch && one.Calibration.Band == entry.Calibration.Band))
            {
                throw node.Refusal("this patch and band are there twice", "keep one of the two");
            }

            entries.Add(entry);
        }

        if (entries.Count == 0) throw root["entries"].Refusal("the list is empty", "make the calibration again");
        return new CalibrationFile(path, root.Optional("madeBy")?.Text() ?? "", root.Optional("provenance")?.Raw() ?? "{}", entries);
    }

    private static ReadOnlyMemory<byte> Bytes(string path)
    {
        try
        {
            var length = new FileInfo(path).Length;
            if (length > MostBytes)
            {
                throw new RefusedException($"the file has {length} bytes", path, $"a calibration has at most {MostBytes >> 20} MB");
            }

            var bytes = File.ReadAllBytes(path).AsMemory();
            return bytes.Span.StartsWith((ReadOnlySpan<byte>)[0xEF, 0xBB, 0xBF]) ? bytes[3..] : bytes;
        }
        catch (Exception error) when (error is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new RefusedException("no such calibration", path, "check the path, or leave 'calibration' out of the patch", error);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException or ArgumentException)
        {
            throw new RefusedException("the file can't be read", path, CalibrationNode.Plain(error.Message), error);
        }
    }

    // The library appends path, line and byte in a form of its own.
    private static string Reason(JsonException error)
    {
        var message = error.Message;
        var end = message.IndexOf(" LineNumber:", StringComparison.Ordinal);
        return CalibrationNode.Plain((end < 0 ? message : message[..end]).TrimEnd(' ', '.'));
    }
}
