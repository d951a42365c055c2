using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Writes a summary for people: every number with its unit, every claim with its n.</summary>
internal static class SummaryText
{
    public static string Of(RunSummary run) => string.Join('\n', Lines(run)) + "\n";

    private static IEnumerable<string> Lines(RunSummary run)
    {
        var tally = run.Tally;
        yield return $"{run.Session}: {EndWord(run.End)}; rehearsal, nothing was armed";
        yield return "";
        yield return Row("stream", $"{run.Stream}, {run.Channels} channels, {Number(run.RateHz, 0)} Hz, {Number(run.Seconds, 1)} s");
        yield return Row("", $"{run.LostRows} rows lost in {run.Gaps} gaps; {run.BlankedRows} rows blanked after own pulses and shams");
        foreach (var array in run.Arrays) yield return Row("", array);
        yield return Row("frames", $"{tally.Frames} read, {Share(tally.ValidFrames, tally.Frames)} with enough channels observed");
        foreach (var line in Waves(tally)) yield return line;
        foreach (var chance in run.Chance) yield return Row("", Chance(chance));
        foreach (var line in Decisions(tally)) yield return line;
        yield return Row("outcomes", Outcomes(tally));
        yield return "";
        foreach (var line in Latency(run)) yield return line;
        yield return "";
        if (run.Truth is { } truth)
        {
            foreach (var line in Truth(truth)) yield return line;
            yield return "";
        }

        foreach (var line in Cautions(run)) yield return line;
        yield return Row("files", run.Folder);
        yield return Row("", "decisions.tsv, outcomes.tsv, events.tsv, latency.tsv, run.log.jsonl, session.json");
    }

    private static IEnumerable<string> Latency(RunSummary run)
    {
        var ledger = run.Ledger;
        var blocks = ledger.Blocks;
        yield return Row(
            "computing",
            $"block received → judged: median {Ms(blocks.PercentileMs(50))}, 99 % {Ms(blocks.PercentileMs(99))}, largest {Ms(blocks.MaxMs)} "
            + $"(n = {blocks.Count} blocks of up to {run.BlockRows} rows; limit {Ms(blocks.LimitMs)}, exceeded {blocks.OverLimit} times)");
        var late = ledger.Lateness;
        yield return Row(
            "punctuality",
            late.Count == 0
                ? "no pulse or sham reached its instant"
                : $"due → would have been sent: median {Ms(late.PercentileMs(50))}, largest {Ms(late.MaxMs)} (n = {late.Count}; "
                    + $"{run.Tally.CountOf(OutcomeKind.Late)} too late to be sent are left out)" + (run.Clock == "fast" ? "; a fast clock waits, so it is 0" : ""));
        yield return Row(
            "process",
            $"{ledger.Collections} garbage collections, {Number(ledger.PauseMs, 1)} ms stopped; "
            + $"the decision thread allocated {ledger.DecisionThreadBytes} bytes while judging");
        yield return Row(
            "warm-up",
            $"on synthetic waves: {run.Warmup.Pulses} pulses, {run.Warmup.Shams} shams, {run.Warmup.Holds} holds in {Number(run.Warmup.Seconds, 1)} s; "
            + $"self-test 99 % {Ms(run.Warmup.LateBlockP99Ms)} a block of {run.Warmup.BlockRows} rows (n = {run.Warmup.Blocks})");
    }

    private static IEnumerable<string> Truth(TruthComparison truth)
    {
        yield return Row("truth", $"strong planar waves found: {truth.StrongFound} of {truth.Strong}; weaker or longer ones: {truth.WeakFound} of {truth.Weak}");
        if (truth.StrongFound > 0)
        {
            yield return Row("", $"direction of the strong ones: off by a median of {Number(truth.MedianDirectionErrorDegrees, 1)}° (n = {truth.StrongFound})");
            yield return Row("", $"they began to pass a median of {Number(truth.MedianDelayMs, 0)} ms after their onset (n = {truth.StrongFound})");
        }

        yield return Row("", $"decoys (in phase, synchronous) taken for waves: {truth.DecoysTaken} of {truth.Decoys}; waves where nothing was: {truth.Stray}");
        yield return Row("", "one short recording shows how it works; it proves no rate");
    }

    private static IEnumerable<string> Cautions(RunSummary run)
    {
        foreach (var where in run.WithoutNoiseModel)
        {
            yield return Row("caution", $"{where} has no calibration of the noise: a field in phase all over the array can't be told from a wave in correlated noise");
        }

        foreach (var status in run.Tally.Statuses.Where(status => status.Level != StatusLevel.Note))
        {
            yield return Row(StatusLog.Word(status.Level), $"{status.Where}: {status.What}" + (status.Advice.Length > 0 ? $"; {status.Advice}" : ""));
        }

        yield return Row("caution", "for research, not a medical device; stimulation needs licensed practice and your local rules");
    }

    private static IEnumerable<string> Waves(RunTally tally)
    {
        var tracks = tally.Waves.GroupBy(wave => (wave.Patch, wave.Band)).ToList();
        if (tracks.Count == 0) yield return Row("waves", "none");
        foreach (var track in tracks)
        {
            var kinds = track.GroupBy(wave => wave.Kind).OrderBy(kind => kind.Key).Select(kind => (WaveKinds.Word(kind.Key), kind.Count()));
            yield return Row(
                track == tracks[0] ? "waves" : "", $"patch '{track.Key.Patch}', band '{track.Key.Band}': {Counted(kinds, track.Count(), "events")}");
        }
    }

    private static IEnumerable<string> Decisions(RunTally tally)
    {
        if (tally.Decisions.Count == 0) yield return Row("decisions", "none");
        var head = "decisions";
        foreach (var rule in tally.Decisions.GroupBy(decision => decision.Rule, StringComparer.Ordinal))
        {
            int Of(DecisionKind kind) => rule.Count(decision => decision.Kind == kind);
            yield return Row(
                head,
                $"{rule.Key}: {Of(DecisionKind.Pulse)} pulses, {Of(DecisionKind.Sham)} shams, {Of(DecisionKind.Hold)} holds (n = {rule.Count()})");
            head = "";
        }

        var holds = tally.Holds();
        if (holds.Count == 0) yield break;
        yield return Row("", "held because of: " + string.Join(", ", holds.Select(hold => $"{DecisionWords.Failed(hold.Failed)} {hold.Count}")));
    }

    private static string Chance(ChanceRate chance)
    {
        var threshold = chance.Threshold;
        if (threshold.Surrogate is not { } surrogate) return $"{chance.Where}: how often {WaveKinds.Word(threshold.Kind)} events come by chance is not known";
        return $"by chance {Rate(surrogate)} in a surrogate"
            + (threshold.Baseline is { } baseline ? $", {Rate(baseline)} in the baseline" : "")
            + $" ({chance.Where}, as calibrated)";
    }

    private static string Rate(FalseEventRate rate) =>
        $"{Number(rate.PerMinute, 2)} a minute [{Number(rate.LowPerMinute, 2)}, {Number(rate.HighPerMinute, 2)}; {rate.Count} in {Number(rate.Minutes, 0)} min]";

    private static string Outcomes(RunTally tally)
    {
        var kinds = Enum.GetValues<OutcomeKind>().Where(kind => kind != OutcomeKind.NothingDue);
        var counted = kinds.Select(kind => (DecisionWords.Outcome(kind), tally.CountOf(kind))).Where(pair => pair.Item2 > 0).ToList();
        var idle = tally.CountOf(OutcomeKind.NothingDue) - tally.CountOf(DecisionKind.Hold);
        return Counted(counted, counted.Sum(pair => pair.Item2), "pulses and shams, each counted once per output")
            + (idle > 0 ? $"; {idle} of rules without an output" : "");
    }

    private static string Counted(IEnumerable<(string Word, int Count)> counts, int n, string what) =>
        n == 0 ? "none" : string.Join(", ", counts.Select(pair => $"{pair.Count} {pair.Word}")) + $" (n = {n} {what})";

    private static string EndWord(RunEnd end) => end switch
    {
        RunEnd.Ended => "the recording was played to its end",
        RunEnd.RowLimit => "played as far as asked",
        RunEnd.Stopped => "stopped early",
        RunEnd.Lost => "the stream was lost",
        _ => "failed",
    };

    private static string Row(string head, string text) => $"  {head,-12}{text}";

    private static string Ms(double ms) => double.IsNaN(ms) ? "n/a" : $"{Cell.Number(ms, 3)} ms";

    private static string Number(double value, int decimals) => Cell.Number(value, decimals);

    private static string Share(long part, long all) => all == 0 ? "n/a" : $"{Cell.Number(100.0 * part / all, 1)} %";
}
