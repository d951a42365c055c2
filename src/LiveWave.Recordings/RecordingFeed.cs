using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>A feed that reads one stream of a recording, as fast as it is asked; pacing is the host's.</summary>
/// <remarks>Every pull brings exactly as many rows as the block holds, until the stream ends or begins anew: where the file's own
/// chunks end makes no difference. Reads without waiting.</remarks>
public abstract class RecordingFeed : IFeed
{
    /// <summary>Opens a feed.</summary>
    /// <param name="stream">What is read.</param>
    /// <param name="format">Its rate and channels.</param>
    protected RecordingFeed(StreamDescription stream, StreamFormat format)
    {
        ArgumentNullException.ThrowIfNull(stream);
        ArgumentNullException.ThrowIfNull(format);
        Stream = stream;
        Format = format;
        Positions = [.. stream.Channels.Zip(format.Channels)
            .Where(pair => double.IsFinite(pair.First.XMm) && double.IsFinite(pair.First.YMm))
            .Select(pair => (pair.Second.Label, pair.First.XMm, pair.First.YMm))];
    }

    /// <summary>The stream as the file describes it.</summary>
    public StreamDescription Stream { get; }

    /// <inheritdoc/>
    public StreamFormat Format { get; }

    /// <summary>Electrode positions that the file itself gives, in mm (+x right, +y up in the array's own frame), by the labels of
    /// <see cref="Format"/>; channels without one are left out.</summary>
    public IReadOnlyList<(string Name, double XMm, double YMm)> Positions { get; }

    /// <summary>Damage and oddities met so far: byte offset, what, bytes or rows skipped. Grows while the feed is read, up to a bound.</summary>
    public abstract IReadOnlyList<Status> Warnings { get; }

    /// <inheritdoc/>
    public abstract PullResult Pull(SampleBlock into, TimeSpan atMost);

    /// <inheritdoc/>
    public void Dispose()
    {
        Dispose(disposing: true);
        GC.SuppressFinalize(this);
    }

    /// <summary>Closes the file.</summary>
    /// <param name="disposing">True when called from <see cref="Dispose()"/>.</param>
    protected abstract void Dispose(bool disposing);
}
