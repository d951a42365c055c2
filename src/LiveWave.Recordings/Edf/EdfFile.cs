using System.Globalization;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>A recording in EDF, EDF+ (continuous or discontinuous), BDF or BDF+ (Kemp et al. 1992; Kemp and Olivan 2003).</summary>
/// <remarks>Signals of one rate are one stream, called by its rate (<c>160 Hz</c>); the stream with most channels is <c>#1</c>.
/// Annotations are listed as a stream of text and read by <see cref="EdfAnnotations"/>. The fields about patient, recording,
/// equipment and filters, and the start date, are never read.</remarks>
public sealed class EdfFile : RecordingFile
{
    private readonly EdfHeader _header;
    private readonly IReadOnlyList<EdfGroup> _groups;

    private EdfFile(string path, EdfHeader header, IReadOnlyList<EdfGroup> groups, IReadOnlyList<Status> warnings)
        : base(path, Listed(header, groups), warnings)
    {
        _header = header;
        _groups = groups;
    }

    /// <summary>Lists the streams of a file whose first bytes were looked at.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    /// <param name="kind">EDF or BDF.</param>
    /// <exception cref="RefusedException">The header is damaged, or the times of the data records go backwards.</exception>
    internal static EdfFile Scan(FileWindow window, string path, RecordingKind kind)
    {
        var warnings = new ReadWarnings(path);
        var header = EdfHeaderReader.Read(window, path, kind, warnings);
        var groups = EdfGroup.Of(header);
        if (groups.Count > 0) FollowTimes(window, path, header, warnings);
        return new EdfFile(path, header, groups, warnings.All);
    }

    /// <inheritdoc/>
    protected override RecordingFeed OpenFeed(StreamDescription stream)
    {
        var group = _groups.First(candidate => ReferenceEquals(candidate.Described, stream));
        return new EdfFeed(Path, _header, group, Warnings);
    }

    // Once at opening: what is wrong with the times is to be known before anything runs on them.
    private static void FollowTimes(FileWindow window, string path, EdfHeader header, ReadWarnings warnings)
    {
        if (header.Annotations.Count == 0) return;
        var timeline = new EdfTimeline(window, path, header);
        for (var record = 0L; record < header.Records; record++) timeline.TryStart(record, out _);
        if (timeline.FirstJumpAt >= 0)
        {
            warnings.Add(timeline.FirstJumpAt, "time jumps, though the file calls itself continuous", "it is read as discontinuous: a jump is a gap");
        }

        if (timeline.Untold == 0) return;
        warnings.Add(
            timeline.FirstUntoldAt,
            $"{timeline.Untold} of {header.Records} data records don't begin with their time; this is the first",
            header.IsDiscontinuous ? "their rows are left out" : "they are taken to follow the one before without a gap");
    }

    private static List<StreamDescription> Listed(EdfHeader header, IReadOnlyList<EdfGroup> groups)
    {
        var streams = groups.Select(group => group.Described).ToList();
        if (header.Annotations.Count == 0) return streams;
        var key = "#" + (groups.Count + 1).ToString(CultureInfo.InvariantCulture);
        streams.Add(new StreamDescription(key, EdfAnnotations.StreamName, "Markers", 1, 0, "text", null, [], ""));
        return streams;
    }
}
