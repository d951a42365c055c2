using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>The annotations of an EDF+ or BDF+ file, read at once. Not for the decision path.</summary>
/// <remarks>Stamps count from the start of the file, as those of <see cref="EdfFeed"/> do. A marker has no duration: durations are
/// passed over. The lists that merely tell when a data record begins are left out.</remarks>
public sealed class EdfAnnotations
{
    /// <summary>What the markers' stream is called.</summary>
    public const string StreamName = "annotations";

    /// <summary>Most annotations that are kept.</summary>
    public const int Most = 100_000;

    private const long MostTextBytes = 16 << 20;

    private readonly List<Marker> _markers = [];
    private readonly FileWindow _window;
    private readonly ReadWarnings _warnings;
    private long _textBytes;
    private long _unreadable;
    private long _firstUnreadableAt;
    private bool _isToldOfLetters;

    private EdfAnnotations(FileWindow window, string path)
    {
        _window = window;
        _warnings = new ReadWarnings(path);
    }

    /// <summary>The annotations by onset; those of one onset as the file has them.</summary>
    public IReadOnlyList<Marker> Markers { get; private set; } = [];

    /// <summary>Annotations beyond <see cref="Most"/>, or beyond 16 MB of text.</summary>
    public long LeftOut { get; private set; }

    /// <summary>Damage and oddities: byte offset, what.</summary>
    public IReadOnlyList<Status> Warnings => _warnings.All;

    /// <summary>Reads the annotations of a file.</summary>
    /// <param name="path">The file.</param>
    /// <returns>None if the file has none.</returns>
    /// <exception cref="RefusedException">The file is missing or no EDF or BDF, or its header is damaged.</exception>
    public static EdfAnnotations Read(string path)
    {
        using var window = FileWindow.Open(path, FileWindow.ReadBytes);
        var kind = FileKind.Tell(window, path);
        if (kind == RecordingKind.Xdf) throw new RefusedException("an XDF file has no annotations of this kind", path, "its markers are streams of their own");
        var read = new EdfAnnotations(window, path);
        read.All(EdfHeaderReader.Read(window, path, kind, read._warnings));
        return read;
    }

    private void All(EdfHeader header)
    {
        for (var record = 0L; record < header.Records; record++)
        {
            foreach (var signal in header.Annotations)
            {
                var at = header.RecordStart(record) + signal.OffsetInRecord;
                var bytes = (long)signal.SamplesPerRecord * header.SampleBytes;
                Lists(at, _window.Peek(at, (int)Math.Min(bytes, _window.Size)));
                if (bytes > _window.Size) _warnings.Add(at + _window.Size, "annotations of one data record that go on for so long are not read", bytes - _window.Size);
            }
        }

        Markers = [.. _markers.OrderBy(marker => marker.StampSeconds)];
        if (LeftOut > 0) _warnings.Add($"more annotations than are kept: {LeftOut} are left out", $"at most {Most} are kept, and {MostTextBytes >> 20} MB of text");
        if (_unreadable > 0) _warnings.Add(_firstUnreadableAt, $"{_unreadable} annotations can't be read; this is the first", "they are left out");
    }

    private void Lists(long at, ReadOnlySpan<byte> bytes)
    {
        for (var from = 0; from < bytes.Length;)
        {
            var rest = bytes[from..];
            var length = rest.IndexOf((byte)0);
            if (length < 0) length = rest.Length;
            if (length > 0) OneList(at + from, rest[..length]);
            from += length + 1;
        }
    }

    private void OneList(long at, ReadOnlySpan<byte> list)
    {
        if (!EdfTal.TryRead(list, out var tal))
        {
            Unreadable(at);
            return;
        }

        var texts = tal.Texts;
        while (EdfTal.TryTake(ref texts, out var text))
        {
            if (!text.IsEmpty) Keep(at, tal.OnsetSeconds, text);
        }

        if (!texts.IsEmpty) Unreadable(at);      // a text without its end mark is cut
    }

    private void Keep(long at, double onsetSeconds, ReadOnlySpan<byte> text)
    {
        if (_markers.Count == Most || _textBytes + text.Length > MostTextBytes)
        {
            LeftOut++;
            return;
        }

        if (!_isToldOfLetters && !System.Text.Unicode.Utf8.IsValid(text))
        {
            _isToldOfLetters = true;
            _warnings.Add(at, "an annotation is not UTF-8", "what can't be read of it and others is replaced");
        }

        _textBytes += text.Length;
        _markers.Add(new Marker(StreamName, Encoding.UTF8.GetString(text), onsetSeconds));
    }

    private void Unreadable(long at)
    {
        if (_unreadable++ == 0) _firstUnreadableAt = at;
    }
}
