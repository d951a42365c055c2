using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>When each data record begins, asked for in their order: by its own annotation in EDF+, else by counting.</summary>
/// <param name="window">The file.</param>
/// <param name="path">As the user gave it.</param>
/// <param name="header">Its header.</param>
internal sealed class EdfTimeline(FileWindow window, string path, EdfHeader header)
{
    // The time of a record is the first thing in its annotations.
    private const int LookedBytes = 64;

    // Onsets written with few decimals tremble against a fast rate; in a file that says it is continuous that is no gap.
    private const double TrembleSeconds = 1e-3;

    private readonly EdfSignal? _annotations = header.Annotations.Count > 0 ? header.Annotations[0] : null;
    private long _lastRecord;
    private double _lastSeconds = header.IsDiscontinuous ? double.NaN : 0;

    /// <summary>Records so far that don't tell their time.</summary>
    public long Untold { get; private set; }

    /// <summary>Where the annotations of the first of them are.</summary>
    public long FirstUntoldAt { get; private set; }

    /// <summary>Where time first jumped, though the file says that it is continuous; −1: nowhere.</summary>
    public long FirstJumpAt { get; private set; } = -1;

    /// <summary>Tells when a record begins.</summary>
    /// <param name="record">From 0, one after the other.</param>
    /// <param name="seconds">From the start of the file.</param>
    /// <returns>False if the time isn't known: a discontinuous file that doesn't tell.</returns>
    /// <exception cref="RefusedException">The record begins before the one before it ended, by half a sample or more.</exception>
    public bool TryStart(long record, out double seconds)
    {
        seconds = record * header.RecordSeconds;
        if (_annotations is null) return true;
        seconds = _lastSeconds + ((record - _lastRecord) * header.RecordSeconds);
        var at = header.RecordStart(record) + _annotations.OffsetInRecord;
        if (TryOwn(at, out var own))
        {
            seconds = record == 0 || double.IsNaN(_lastSeconds) ? own : Placed(record, own, seconds, at);
            _lastRecord = record;
            _lastSeconds = seconds;
            return true;
        }

        if (Untold++ == 0) FirstUntoldAt = at;
        return !header.IsDiscontinuous;
    }

    private double Placed(long record, double own, double counted, long at)
    {
        var late = own - counted;
        if (Math.Abs(late) <= header.ShortestPeriodSeconds / 2) return own;
        if (!header.IsDiscontinuous && Math.Abs(late) <= TrembleSeconds) return counted;
        if (late < 0)
        {
            throw new RefusedException(
                FormattableString.Invariant($"data record {record} begins at {own} s, before the one before it ends ({counted:0.######} s)"),
                $"{path}, byte {at}",
                "the times of the records are damaged or out of order: copy or export the recording again");
        }

        if (!header.IsDiscontinuous && FirstJumpAt < 0) FirstJumpAt = at;
        return own;
    }

    private bool TryOwn(long at, out double seconds)
    {
        seconds = double.NaN;
        var length = Math.Min(LookedBytes, (long)_annotations!.SamplesPerRecord * header.SampleBytes);
        var bytes = window.Peek(at, (int)length);
        var end = bytes.IndexOf((byte)0);
        if (!EdfTal.TryRead(end < 0 ? bytes : bytes[..end], out var tal) || !tal.IsTimeKeeping) return false;
        seconds = tal.OnsetSeconds;
        return true;
    }
}
