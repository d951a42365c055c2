using LiveWave.Abstractions;

namespace LiveWave.App;

/// <summary>Compares the wave events of a run with what was put into the recording.</summary>
/// <remarks>A planar wave counts as found if an event of kind planar was passing at some instant from its onset to 150 ms after
/// its end. A decoy counts against us if an event of a travelling kind began to pass within the same span of it. Waves that had
/// not ended when the run ended are left out.</remarks>
internal sealed class TruthComparison
{
    private readonly double _firstStamp;
    private readonly double _rotationDegrees;

    /// <param name="truth">What was put in, in the array's own frame.</param>
    /// <param name="events">Events of one patch in one band.</param>
    /// <param name="rotationDegrees">How far the layout is turned against the array's own frame.</param>
    /// <param name="firstStamp">Stamp of the first row.</param>
    /// <param name="lastStamp">Stamp of the last row judged.</param>
    public TruthComparison(
        IReadOnlyList<TruthRow> truth, IReadOnlyList<WaveEvent> events, double rotationDegrees, double firstStamp, double lastStamp)
    {
        _firstStamp = firstStamp;
        _rotationDegrees = rotationDegrees;
        var seen = truth.Where(row => row.UntilSeconds <= lastStamp - firstStamp).ToList();
        var planar = seen.Where(row => row.Kind == WaveKinds.Word(WaveKind.Planar)).ToList();
        var decoys = seen.Where(row => !WaveKinds.TryParse(row.Kind, out var kind) || !WaveKinds.Travels(kind)).ToList();
        var travelling = events.Where(wave => WaveKinds.Travels(wave.Kind)).ToList();
        var pairs = planar.Select(row => (Row: row, Event: Find(row, travelling))).ToList();
        Strong = planar.Count(row => row.IsStrong);
        StrongFound = pairs.Count(pair => pair.Row.IsStrong && pair.Event is not null);
        Weak = planar.Count - Strong;
        WeakFound = pairs.Count(pair => !pair.Row.IsStrong && pair.Event is not null);
        Decoys = decoys.Count;
        DecoysTaken = decoys.Count(row => travelling.Any(wave => Begins(wave, row)));
        Stray = travelling.Count(wave => !truth.Any(row => Overlaps(wave, row)));   // also of what had not ended
        var found = pairs.Where(pair => pair.Row.IsStrong).Where(pair => pair.Event is not null).ToList();
        MedianDirectionErrorDegrees = Median([.. found.Select(pair => Error(pair.Event!.Value, pair.Row))]);
        MedianDelayMs = Median([.. found.Select(pair => 1000 * (Passed(pair.Event!.Value) - pair.Row.OnsetSeconds))]);
    }

    /// <summary>Planar waves at 6 dB or more and up to two apertures long.</summary>
    public int Strong { get; }

    public int StrongFound { get; }

    /// <summary>The other planar waves.</summary>
    public int Weak { get; }

    public int WeakFound { get; }

    /// <summary>What does not travel: synchronous, in-phase and standing bursts.</summary>
    public int Decoys { get; }

    public int DecoysTaken { get; }

    /// <summary>Events of a travelling kind where nothing was put in.</summary>
    public int Stray { get; }

    /// <summary>Median |direction − truth| when strong waves began to pass; NaN if none was found.</summary>
    public double MedianDirectionErrorDegrees { get; }

    /// <summary>Median time from a strong wave's true onset until its event began to pass.</summary>
    public double MedianDelayMs { get; }

    private double Error(WaveEvent wave, TruthRow row)
    {
        var off = wave.DirectionDegrees - _rotationDegrees - row.DirectionDegrees;
        return Math.Abs(off - (360 * Math.Floor((off + 180) / 360)));
    }

    private static double Median(double[] values)
    {
        if (values.Length == 0) return double.NaN;
        Array.Sort(values);
        var middle = values.Length / 2;
        return values.Length % 2 == 1 ? values[middle] : 0.5 * (values[middle - 1] + values[middle]);
    }

    private WaveEvent? Find(TruthRow row, IReadOnlyList<WaveEvent> events)
    {
        foreach (var wave in events)
        {
            if (wave.Kind == WaveKind.Planar && Overlaps(wave, row)) return wave;
        }

        return null;
    }

    private bool Overlaps(WaveEvent wave, TruthRow row) =>
        Passed(wave) <= row.UntilSeconds && wave.Last.StampSeconds - _firstStamp >= row.OnsetSeconds;

    private bool Begins(WaveEvent wave, TruthRow row) => Passed(wave) >= row.OnsetSeconds && Passed(wave) <= row.UntilSeconds;

    private double Passed(WaveEvent wave) => wave.Passed.StampSeconds - _firstStamp;
}
