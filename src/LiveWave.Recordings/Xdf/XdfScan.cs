namespace LiveWave.Recordings;

/// <summary>Goes once through the frames of an XDF file and collects its streams; passes over the samples.</summary>
internal sealed class XdfScan
{
    // A list that no recording needs and every machine can hold.
    private const int MostStreams = 1024;
    private const int MostChannels = 1 << 18;

    private readonly FileWindow _window;
    private readonly ReadWarnings _warnings;
    private readonly XdfLayout _layout;
    private readonly XdfWalk _walk;
    private readonly Dictionary<uint, XdfStream> _known = [];
    private readonly List<XdfStream> _streams = [];
    private readonly HashSet<ulong> _told = [];
    private int _channelsKept;

    /// <summary>Prepares for one file.</summary>
    /// <param name="window">The file; it begins with the magic.</param>
    /// <param name="warnings">Told of damage and oddities.</param>
    public XdfScan(FileWindow window, ReadWarnings warnings)
    {
        _window = window;
        _warnings = warnings;
        _layout = new XdfLayout(window, _known);
        _walk = new XdfWalk(window, _layout, warnings);
    }

    /// <summary>The streams in the order of their headers.</summary>
    public IReadOnlyList<XdfStream> Streams()
    {
        while (_walk.TryNext(out var chunk))
        {
            if (chunk.IsCut) continue;      // samples, warned of already
            if (chunk.Tag == XdfTag.StreamHeader) Header(chunk);
            else if (_layout.Fits(chunk)) _walk.Confirm(chunk);
            else Odd(chunk);
        }

        return _streams;
    }

    private void Header(in XdfChunk chunk)
    {
        if (!_layout.Fits(chunk) || !_layout.TryStream(chunk, out var id))
        {
            _walk.Reject(chunk, chunk.Start, "a stream header without a description");
            return;
        }

        if (!_known.ContainsKey(id) && _streams.Count == MostStreams)
        {
            TellOnce(ulong.MaxValue, chunk.Start, $"more than {MostStreams} streams: the rest is not listed");
            return;
        }

        var stream = _channelsKept > MostChannels
            ? new XdfStream(id, XdfDescription.Unread(id, $"the streams before it describe more than {MostChannels} channels"), "")
            : XdfStream.Read(_window, chunk, id);
        if (_known.TryGetValue(id, out var before))
        {
            var same = stream.Print == before.Print ? "the same again" : "and it differs";
            _warnings.Add(chunk.Start, $"a second header of stream {id}, {same}", 0);
            if (stream.IsReadable) _walk.Confirm(chunk);
            return;
        }

        Keep(chunk, stream);
    }

    private void Keep(in XdfChunk chunk, XdfStream stream)
    {
        var described = stream.Described;
        _known.Add(stream.Id, stream);
        _streams.Add(stream);
        _channelsKept += described.Channels.Count;
        if (stream.IsReadable) _walk.Confirm(chunk);
        else _warnings.Add(chunk.Start, $"stream {described.Key} '{PlainText.Of(described.Name)}' can't be read: {described.Problem}", 0);
    }

    private void Odd(in XdfChunk chunk)
    {
        if (chunk.Tag is not (XdfTag.Samples or XdfTag.ClockOffset or XdfTag.StreamFooter or XdfTag.FileHeader))
        {
            TellOnce((ulong)chunk.Tag, chunk.Start, $"a chunk of unknown kind {(int)chunk.Tag} is passed over");
            return;
        }

        if (chunk.Tag == XdfTag.FileHeader || !_layout.TryStream(chunk, out var id))
        {
            _walk.Reject(chunk, chunk.Start, $"a chunk of kind {(int)chunk.Tag} that makes no sense");
            return;
        }

        if (!_known.TryGetValue(id, out var stream))
        {
            TellOnce((1UL << 32) + id, chunk.Start, $"chunks of stream {id}, which has no header before them, are passed over");
        }
        else if (stream.IsReadable)
        {
            _walk.Reject(chunk, chunk.Start, $"a chunk of kind {(int)chunk.Tag} that doesn't fit stream {id}");
        }
    }

    private void TellOnce(ulong about, long at, string what)
    {
        if (_told.Count < MostStreams && _told.Add(about)) _warnings.Add(at, what, 0);
    }
}
