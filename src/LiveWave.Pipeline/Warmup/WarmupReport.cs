namespace LiveWave.Pipeline;

/// <summary>What a warm-up did.</summary>
/// <param name="Pulses">Pulses decided.</param>
/// <param name="Shams">Shams decided.</param>
/// <param name="Holds">Holds decided.</param>
/// <param name="Seconds">How long it took.</param>
/// <param name="LateBlockP99Ms">99th percentile of computing a block in the second half, ms: the self-test.</param>
/// <param name="BlockRows">Rows of such a block.</param>
/// <param name="Blocks">Blocks it was measured over.</param>
/// <param name="Trouble">What failed in the clone; empty if nothing did.</param>
public sealed record WarmupReport(
    int Pulses, int Shams, int Holds, double Seconds, double LateBlockP99Ms, int BlockRows, long Blocks, string Trouble);
