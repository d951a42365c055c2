using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads an EDF header: the fields that say how the data lie, and no other. Tolerant where it is plain what was meant, with
/// a warning; refuses where the data would be read wrongly.</summary>
internal sealed class EdfHeaderReader
{
    private const int MostSignals = 4096;
    private const int LabelBytes = 16;
    private const int HeaderBytesAt = 184;
    private const int ReservedAt = 192;
    private const int RecordsAt = 236;
    private const int RecordSecondsAt = 244;
    private const int SignalsAt = 252;

    private readonly FileWindow _window;
    private readonly string _path;
    private readonly ReadWarnings _warnings;
    private readonly EdfFields _fields;
    private readonly int _sampleBytes;
    private int _signals;
    private int _withoutUnit;

    private EdfHeaderReader(FileWindow window, string path, RecordingKind kind, ReadWarnings warnings)
    {
        _window = window;
        _path = path;
        _warnings = warnings;
        _fields = new EdfFields(window, path, warnings);
        _sampleBytes = kind == RecordingKind.Bdf ? 3 : 2;
    }

    /// <summary>Reads the header, and compares it with the length of the file.</summary>
    /// <param name="window">The file.</param>
    /// <param name="path">As the user gave it.</param>
    /// <param name="kind">EDF or BDF, as its first bytes say.</param>
    /// <param name="warnings">Told what is odd.</param>
    /// <exception cref="RefusedException">The header is cut, or a field makes no sense.</exception>
    public static EdfHeader Read(FileWindow window, string path, RecordingKind kind, ReadWarnings warnings) =>
        new EdfHeaderReader(window, path, kind, warnings).Read();

    private EdfHeader Read()
    {
        RequireBytes(EdfHeader.PartBytes);
        _signals = (int)_fields.Whole(SignalsAt, 4, "the number of signals", 1, MostSignals);
        var headerBytes = EdfHeader.PartBytes * (_signals + 1);
        RequireBytes(headerBytes);
        if (!_fields.TryWhole(HeaderBytesAt, EdfFields.NumberBytes, out var told) || told != headerBytes)
        {
            var found = _fields.Shown(HeaderBytesAt, EdfFields.NumberBytes);
            _warnings.Add(HeaderBytesAt, $"the header's length is given as '{found}'", $"{_signals} signals make it {headerBytes}, which is used");
        }

        var records = _fields.Whole(RecordsAt, EdfFields.NumberBytes, "the number of data records", -1, 99_999_999);
        var seconds = _fields.Number(RecordSecondsAt, "the duration of a data record");
        if (!(seconds >= 0))
        {
            throw _fields.Refusal(RecordSecondsAt, EdfFields.NumberBytes, "the duration of a data record", "a number of seconds, 0 or more, belongs there");
        }

        var header = new EdfHeader(_sampleBytes, IsDiscontinuous(), seconds, ReadSignals(), 0);
        RequireTime(header);
        return header with { Records = EdfExtent.Records(_window, _path, header, records, RecordsAt, _warnings) };
    }

    private void RequireBytes(int bytes)
    {
        if (_window.Length >= bytes) return;
        throw new RefusedException(
            $"the file ends inside its header: {_window.Length} bytes of {bytes}", $"{_path}, byte {_window.Length}", "copy the recording again");
    }

    private bool IsDiscontinuous() => _window.Peek(ReservedAt + 3, 2).SequenceEqual("+D"u8);

    private void RequireTime(EdfHeader header)
    {
        var sampled = header.Signals.FirstOrDefault(signal => !signal.IsAnnotations && signal.SamplesPerRecord > 0);
        if (sampled is null) return;
        if (header.RecordSeconds == 0 || !double.IsFinite(1 / header.ShortestPeriodSeconds))
        {
            throw _fields.Refusal(
                RecordSecondsAt, EdfFields.NumberBytes, "the duration of a data record", $"signal {sampled.Number} has samples, and so no rate");
        }

        if (!header.IsDiscontinuous || header.Annotations.Count > 0) return;
        throw new RefusedException(
            "the file calls itself discontinuous, and has no annotations that tell when its records are",
            $"{_path}, byte {ReservedAt}",
            "write it again with annotations, or as continuous if it is");
    }

    private List<EdfSignal> ReadSignals()
    {
        var signals = new List<EdfSignal>(_signals);
        var offset = 0L;
        for (var i = 0; i < _signals; i++)
        {
            var samplesAt = FieldAt(216, EdfFields.NumberBytes, i);
            var samples = (int)_fields.Whole(samplesAt, EdfFields.NumberBytes, $"samples per record of signal {i + 1}", 0, 99_999_999);
            signals.Add(ReadSignal(i, samples, offset));
            if (samples == 0) _warnings.Add(samplesAt, $"signal {i + 1} has no samples", "it is left out");
            offset += (long)samples * _sampleBytes;
        }

        if (_withoutUnit > 0) _warnings.Add($"{_withoutUnit} of {_signals} signals have no unit", "unit unknown: their numbers are kept as they are");
        return signals;
    }

    private EdfSignal ReadSignal(int i, int samples, long offset)
    {
        var label = _fields.Text(FieldAt(0, LabelBytes, i), LabelBytes, $"the label of signal {i + 1}");
        if (label is "EDF Annotations" or "BDF Annotations") return new EdfSignal(i + 1, label, "", (1, 0), samples, offset, IsAnnotations: true, "");

        // The trigger word of BDF is bits, not a quantity: whoever masks it needs the numbers as they are.
        if (_sampleBytes == 3 && label == "Status") return new EdfSignal(i + 1, label, "", (1, 0), samples, offset, IsAnnotations: false, "");
        var unit = Unit(i);
        if (unit.Length == 0) _withoutUnit++;
        var scaling = Scaling(i, out var problem);
        return new EdfSignal(i + 1, label, unit, scaling, samples, offset, IsAnnotations: false, problem);
    }

    // The micro sign is the one letter beyond ASCII that is met everywhere; it needs no warning.
    private string Unit(int i)
    {
        var at = FieldAt(96, EdfFields.NumberBytes, i);
        var bytes = _window.Peek(at, EdfFields.NumberBytes).Trim("\0 "u8);
        if (bytes.SequenceEqual((ReadOnlySpan<byte>)[0xB5, (byte)'V']) || bytes.SequenceEqual("\u00B5V"u8)) return "\u00B5V";
        return _fields.Text(at, EdfFields.NumberBytes, $"the unit of signal {i + 1}");
    }

    private (double Scale, double Offset) Scaling(int i, out string problem)
    {
        var physicalLow = Limit(104, i, "physical minimum", out problem);
        var physicalHigh = Limit(112, i, "physical maximum", out var problemHigh);
        var digitalLow = Limit(120, i, "digital minimum", out var problemDigital);
        var digitalHigh = Limit(128, i, "digital maximum", out var problemDigitalHigh);
        problem = new[] { problem, problemHigh, problemDigital, problemDigitalHigh }.FirstOrDefault(one => one.Length > 0, "");
        if (problem.Length > 0) return (1, 0);
        if (digitalHigh <= digitalLow)
        {
            problem = $"byte {FieldAt(128, EdfFields.NumberBytes, i)}: signal {i + 1} has a digital maximum {digitalHigh} that is not above its minimum {digitalLow}";
            return (1, 0);
        }

        var scale = (physicalHigh - physicalLow) / (digitalHigh - digitalLow);
        var offset = physicalLow - (digitalLow * scale);
        if (double.IsFinite(scale) && double.IsFinite(offset) && scale != 0) return (scale, offset);
        problem = $"byte {FieldAt(104, EdfFields.NumberBytes, i)}: signal {i + 1} has physical limits {physicalLow} and {physicalHigh}, which give no scale";
        return (1, 0);
    }

    private double Limit(int part, int i, string name, out string problem)
    {
        var at = FieldAt(part, EdfFields.NumberBytes, i);
        var field = $"the {name} of signal {i + 1}";
        var value = _fields.Number(at, field);
        problem = double.IsNaN(value) ? $"byte {at}: {field} is '{_fields.Shown(at, EdfFields.NumberBytes)}', not a number" : "";
        return value;
    }

    // Each field of all signals, then the next: `part` is the bytes of the fields before it.
    private long FieldAt(int part, int width, int signal) => EdfHeader.PartBytes + ((long)part * _signals) + ((long)width * signal);
}
