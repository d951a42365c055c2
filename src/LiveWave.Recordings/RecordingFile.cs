using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>A recording on disk, known by its content and not by its name: which streams it holds, and a feed for one of them.</summary>
/// <remarks>Holds no open file. Not for the decision path: opening reads every chunk header of the file, or the time of
/// every data record.</remarks>
public abstract class RecordingFile
{
    /// <summary>Describes a recording.</summary>
    /// <param name="path">As the user gave it.</param>
    /// <param name="streams">In the order of the file.</param>
    /// <param name="warnings">What was met while the streams were looked for.</param>
    protected RecordingFile(string path, IReadOnlyList<StreamDescription> streams, IReadOnlyList<Status> warnings)
    {
        Path = path;
        Streams = streams;
        Warnings = warnings;
    }

    /// <summary>The file, as the user gave it.</summary>
    public string Path { get; }

    /// <summary>What the file holds, in its own order; streams that can't be read say so in <see cref="StreamDescription.Problem"/>.</summary>
    public IReadOnlyList<StreamDescription> Streams { get; }

    /// <summary>Damage and oddities met while the streams were looked for: byte offset, what, bytes skipped.</summary>
    public IReadOnlyList<Status> Warnings { get; }

    /// <summary>Looks at a file and lists its streams.</summary>
    /// <param name="path">The file.</param>
    /// <exception cref="RefusedException">The file is missing, can't be opened, or is of no kind that is read.</exception>
    public static RecordingFile Open(string path)
    {
        using var window = FileWindow.Open(path, FileWindow.ScanBytes);
        return FileKind.Tell(window, path) switch
        {
            RecordingKind.Edf => EdfFile.Scan(window, path, RecordingKind.Edf),
            RecordingKind.Bdf => EdfFile.Scan(window, path, RecordingKind.Bdf),
            _ => XdfFile.Scan(window, path),
        };
    }

    /// <summary>Opens one stream from its first row on.</summary>
    /// <param name="stream">As <see cref="Choose"/> takes it.</param>
    /// <returns>To be disposed by the caller.</returns>
    /// <exception cref="RefusedException">There is no such stream, or it can't be read as a signal.</exception>
    public RecordingFeed OpenFeed(string? stream = null) => OpenFeed(Choose(stream));

    /// <summary>Finds the stream to read.</summary>
    /// <param name="stream">Its name, or <c>#</c> and its number in the file; null: the only regular stream of numbers.</param>
    /// <exception cref="RefusedException">None or several fit, or the stream can't be read as a signal; the message lists what is there.</exception>
    public StreamDescription Choose(string? stream)
    {
        if (Streams.Count == 0)
        {
            throw new RefusedException("the file holds no stream", Path, "nothing can be read from it; was the recording cut off at once?");
        }

        return stream is null ? TheOnlySignal() : Named(stream);
    }

    /// <summary>Opens a stream of this file.</summary>
    /// <param name="stream">One of <see cref="Streams"/>.</param>
    protected abstract RecordingFeed OpenFeed(StreamDescription stream);

    private StreamDescription TheOnlySignal()
    {
        var signals = Streams.Where(candidate => candidate.IsRegularSignal).ToList();
        if (signals.Count == 1) return signals[0];
        if (signals.Count > 1)
        {
            throw new RefusedException($"{signals.Count} regular streams of numbers", Path, "say which one by its name: " + Listed(signals));
        }

        if (Streams.Count == 1) throw Streams[0].Refusal(Path);
        throw new RefusedException("no regular stream of numbers", Path, "the file holds " + Listed(Streams));
    }

    private StreamDescription Named(string stream)
    {
        var named = Streams.Where(candidate => candidate.Name == stream).ToList();
        if (named.Count == 0) named = [.. Streams.Where(candidate => candidate.Key == stream)];
        if (named.Count == 0)
        {
            throw new RefusedException($"no stream is called '{PlainText.Of(stream)}'", Path, "the file holds " + Listed(Streams));
        }

        var signals = named.Where(candidate => candidate.IsRegularSignal).ToList();
        if (signals.Count == 1) return signals[0];
        if (signals.Count == 0) throw named[0].Refusal(Path);
        throw new RefusedException(
            $"{signals.Count} streams are called '{PlainText.Of(stream)}'", Path, "say which one by its number: " + Listed(signals));
    }

    private static string Listed(List<StreamDescription> streams) => Listed((IReadOnlyList<StreamDescription>)streams);

    private static string Listed(IReadOnlyList<StreamDescription> streams)
    {
        const int Most = 20;
        var listed = string.Join(", ", streams.Take(Most).Select(stream => stream.ToString()));
        return streams.Count > Most ? $"{listed} and {streams.Count - Most} more" : listed;
    }
}
