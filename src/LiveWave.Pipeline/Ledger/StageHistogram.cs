using HdrHistogram;

namespace LiveWave.Pipeline;

/// <summary>How long one stage took, over a run. Recording allocates nothing.</summary>
public sealed class StageHistogram
{
    private const long HighestNanoseconds = 60L * 1_000_000_000;
    private readonly LongHistogram _histogram = new(HighestNanoseconds, 3);

    /// <summary>Makes an empty one.</summary>
    /// <param name="stage">What it measures.</param>
    /// <param name="limitMs">The budget's limit, ms; NaN where there is none.</param>
    public StageHistogram(string stage, double limitMs = double.NaN)
    {
        Stage = stage;
        LimitMs = limitMs;
    }

    /// <summary>What it measures.</summary>
    public string Stage { get; }

    /// <summary>The budget's limit, ms; NaN where there is none.</summary>
    public double LimitMs { get; }

    /// <summary>Values recorded.</summary>
    public long Count => _histogram.TotalCount;

    /// <summary>Values above the limit.</summary>
    public long OverLimit { get; private set; }

    /// <summary>The histogram itself, for its log.</summary>
    public LongHistogram Histogram => _histogram;

    /// <summary>Records a duration.</summary>
    /// <param name="seconds">Negative counts as 0, NaN is left out.</param>
    public void Record(double seconds)
    {
        if (double.IsNaN(seconds)) return;
        var nanoseconds = (long)(seconds * 1e9);
        _histogram.RecordValue(Math.Clamp(nanoseconds, 0, HighestNanoseconds));
        if (seconds * 1000 > LimitMs) OverLimit++;
    }

    /// <summary>A percentile.</summary>
    /// <param name="percent">0 to 100.</param>
    /// <returns>ms; NaN if nothing was recorded.</returns>
    public double PercentileMs(double percent) => Count == 0 ? double.NaN : _histogram.GetValueAtPercentile(percent) / 1e6;

    /// <summary>The largest value, ms; NaN if nothing was recorded.</summary>
    public double MaxMs => Count == 0 ? double.NaN : _histogram.GetMaxValue() / 1e6;
}
