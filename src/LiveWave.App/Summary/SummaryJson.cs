using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Writes a summary for programs: the same figures as <see cref="SummaryText"/>, null for what is not known.</summary>
internal static class SummaryJson
{
    private static readonly JsonSerializerOptions Indented = new() { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static string Of(RunSummary run)
    {
        var tally = run.Tally;
        var root = new JsonObject
        {
            ["verb"] = run.Verb,
            ["session"] = run.Session,
            ["sessionId"] = run.SessionId,
            ["end"] = run.End.ToString(),
            ["stream"] = new JsonObject { ["name"] = run.Stream, ["channels"] = run.Channels, ["rateHz"] = run.RateHz, ["seconds"] = run.Seconds },
            ["clock"] = run.Clock,
            ["blockRows"] = run.BlockRows,
            ["rowsLost"] = run.LostRows,
            ["gaps"] = run.Gaps,
            ["rowsBlanked"] = run.BlankedRows,
            ["frames"] = tally.Frames,
            ["framesValid"] = tally.ValidFrames,
            ["events"] = Counts(tally.Kinds().Select(pair => (WaveKinds.Word(pair.Kind), pair.Count))),
            ["decisions"] = Counts(Enum.GetValues<DecisionKind>().Select(kind => (DecisionWords.What(kind), tally.CountOf(kind)))),
            ["holdsByCondition"] = Counts(tally.Holds().Select(hold => (DecisionWords.Failed(hold.Failed), hold.Count))),
            ["outcomes"] = Counts(Enum.GetValues<OutcomeKind>().Select(kind => (DecisionWords.Outcome(kind), tally.CountOf(kind)))),
            ["latency"] = new JsonArray([.. run.Ledger.Stages.Select(Stage)]),
            ["collections"] = run.Ledger.Collections,
            ["pauseMs"] = run.Ledger.PauseMs,
            ["decisionThreadBytes"] = run.Ledger.DecisionThreadBytes,
            ["warmup"] = new JsonObject
            {
                ["pulses"] = run.Warmup.Pulses,
                ["shams"] = run.Warmup.Shams,
                ["holds"] = run.Warmup.Holds,
                ["seconds"] = run.Warmup.Seconds,
                ["selfTestP99Ms"] = Known(run.Warmup.LateBlockP99Ms),
            },
            ["chance"] = new JsonArray([.. run.Chance.Select(Chance)]),
            ["withoutNoiseModel"] = new JsonArray([.. run.WithoutNoiseModel.Select(where => (JsonNode)where)]),
            ["truth"] = run.Truth is { } truth ? Truth(truth) : null,
            ["folder"] = run.Folder,
            ["numericsPrint"] = run.NumericsPrint,
        };
        return root.ToJsonString(Indented);
    }

    private static JsonNode Chance(ChanceRate chance) => new JsonObject
    {
        ["where"] = chance.Where,
        ["kind"] = WaveKinds.Word(chance.Threshold.Kind),
        ["nominalPerMinute"] = Known(chance.Threshold.NominalPerMinute),
        ["surrogate"] = Rate(chance.Threshold.Surrogate),
        ["baseline"] = Rate(chance.Threshold.Baseline),
    };

    private static JsonObject? Rate(FalseEventRate? rate) => rate is null
        ? null
        : new JsonObject
        {
            ["perMinute"] = Known(rate.PerMinute),
            ["lowPerMinute"] = Known(rate.LowPerMinute),
            ["highPerMinute"] = Known(rate.HighPerMinute),
            ["n"] = rate.Count,
            ["minutes"] = Known(rate.Minutes),
        };

    private static JsonNode Stage(StageHistogram stage) => new JsonObject
    {
        ["stage"] = stage.Stage,
        ["n"] = stage.Count,
        ["p50Ms"] = Known(stage.PercentileMs(50)),
        ["p99Ms"] = Known(stage.PercentileMs(99)),
        ["p999Ms"] = Known(stage.PercentileMs(99.9)),
        ["maxMs"] = Known(stage.MaxMs),
        ["limitMs"] = Known(stage.LimitMs),
        ["overLimit"] = stage.OverLimit,
    };

    private static JsonObject Truth(TruthComparison truth) => new()
    {
        ["strong"] = truth.Strong,
        ["strongFound"] = truth.StrongFound,
        ["weak"] = truth.Weak,
        ["weakFound"] = truth.WeakFound,
        ["decoys"] = truth.Decoys,
        ["decoysTaken"] = truth.DecoysTaken,
        ["stray"] = truth.Stray,
        ["medianDirectionErrorDegrees"] = Known(truth.MedianDirectionErrorDegrees),
        ["medianDelayMs"] = Known(truth.MedianDelayMs),
    };

    private static JsonObject Counts(IEnumerable<(string Word, int Count)> counts)
    {
        var node = new JsonObject();
        foreach (var (word, count) in counts) node[word] = count;
        return node;
    }

    private static JsonValue? Known(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;
}
