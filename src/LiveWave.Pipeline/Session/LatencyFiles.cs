using System.Text;
using HdrHistogram;

namespace LiveWave.Pipeline;

/// <summary>Writes a ledger: <c>latency.tsv</c> with percentiles per stage, <c>latency.hlog</c> with the whole histograms.</summary>
public static class LatencyFiles
{
    /// <summary>Writes both files.</summary>
    /// <param name="folder">Where.</param>
    /// <param name="ledger">The ledger.</param>
    /// <param name="began">When the run began, for the histogram log's heading.</param>
    /// <param name="ended">When it ended.</param>
    public static void Write(SessionFolder folder, LatencyLedger ledger, DateTimeOffset began, DateTimeOffset ended)
    {
        ArgumentNullException.ThrowIfNull(folder);
        ArgumentNullException.ThrowIfNull(ledger);
        using var table = new TableFile(
            folder.At("latency.tsv"), "stage", "n", "p50_ms", "p99_ms", "p999_ms", "max_ms", "limit_ms", "over_limit");
        foreach (var stage in ledger.Stages)
        {
            table.Add(
                stage.Stage,
                Cell.Whole(stage.Count),
                Cell.Number(stage.PercentileMs(50), 4),
                Cell.Number(stage.PercentileMs(99), 4),
                Cell.Number(stage.PercentileMs(99.9), 4),
                Cell.Number(stage.MaxMs, 4),
                Cell.Number(stage.LimitMs, 4),
                double.IsNaN(stage.LimitMs) ? "n/a" : Cell.Whole(stage.OverLimit));
        }

        foreach (var stage in ledger.Stages)
        {
            stage.Histogram.Tag = stage.Stage.Replace(' ', '-').Replace(",", "", StringComparison.Ordinal);
            stage.Histogram.StartTimeStamp = began.ToUnixTimeMilliseconds();
            stage.Histogram.EndTimeStamp = ended.ToUnixTimeMilliseconds();
        }

        // The library writes UTF-16; readers of the format expect plain text.
        using var log = new MemoryStream();
        HistogramLogWriter.Write(log, began.UtcDateTime, [.. ledger.Stages.Select(stage => stage.Histogram)]);
        File.WriteAllText(folder.At("latency.hlog"), Encoding.Unicode.GetString(log.ToArray()).TrimStart('\uFEFF'));
    }
}
