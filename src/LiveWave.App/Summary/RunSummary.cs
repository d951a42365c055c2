using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>What is said at the end of a run, as text and as JSON.</summary>
internal sealed record RunSummary
{
    public required string Verb { get; init; }

    public required string Session { get; init; }

    public required string SessionId { get; init; }

    public required string Stream { get; init; }

    public required int Channels { get; init; }

    public required double RateHz { get; init; }

    public required double Seconds { get; init; }

    public required RunEnd End { get; init; }

    public required string Clock { get; init; }

    public required int BlockRows { get; init; }

    public required long LostRows { get; init; }

    public required long Gaps { get; init; }

    public required long BlankedRows { get; init; }

    public required RunTally Tally { get; init; }

    public required LatencyLedger Ledger { get; init; }

    public required WarmupReport Warmup { get; init; }

    /// <summary>Patch and band pairs whose calibration holds no noise model.</summary>
    public required IReadOnlyList<string> WithoutNoiseModel { get; init; }

    /// <summary>How often events come by chance, as it was calibrated.</summary>
    public required IReadOnlyList<ChanceRate> Chance { get; init; }

    /// <summary>What each patch uses.</summary>
    public required IReadOnlyList<string> Arrays { get; init; }

    /// <summary>Null where no truth lies beside the recording.</summary>
    public TruthComparison? Truth { get; init; }

    public required string Folder { get; init; }

    public required string NumericsPrint { get; init; }
}
