namespace LiveWave.Abstractions;

/// <summary>Something people should know.</summary>
/// <param name="Level">How much it matters.</param>
/// <param name="Where">Which stage, channel, output or file.</param>
/// <param name="What">What happened, in one sentence.</param>
/// <param name="Advice">What to do; empty where there is nothing to do.</param>
/// <param name="AtSeconds">Our clock.</param>
public readonly record struct Status(StatusLevel Level, string Where, string What, string Advice, double AtSeconds);
