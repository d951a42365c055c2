using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>A recording in XDF 1.0. Reading goes on at the next boundary after damage; what was lost is in the warnings.</summary>
/// <remarks>Per channel the elements <c>label</c>, <c>unit</c>, <c>location</c> (mm) of the standard's EEG description are read, and
/// <c>conversion</c>, an element of our own: physical units per number in the file, 1 if absent.</remarks>
public sealed class XdfFile : RecordingFile
{
    private readonly IReadOnlyDictionary<uint, XdfStream> _streams;

    private XdfFile(string path, IReadOnlyList<XdfStream> streams, IReadOnlyList<Status> warnings)
        : base(path, [.. streams.Select(stream => stream.Described)], warnings)
    {
        _streams = streams.ToDictionary(stream => stream.Id);
    }

    /// <summary>Lists the streams of a file whose magic was checked.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    internal static XdfFile Scan(FileWindow window, string path)
    {
        var warnings = new ReadWarnings(path);
        return new XdfFile(path, new XdfScan(window, warnings).Streams(), warnings.All);
    }

    /// <inheritdoc/>
    protected override RecordingFeed OpenFeed(StreamDescription stream)
    {
        var chosen = _streams.Values.First(candidate => ReferenceEquals(candidate.Described, stream));
        return new XdfFeed(Path, chosen, _streams);
    }
}
