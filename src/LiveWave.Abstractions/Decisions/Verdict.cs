namespace LiveWave.Abstractions;

/// <summary>One decision with its outcome.</summary>
/// <param name="Decision">The decision.</param>
/// <param name="Outcome">Its outcome at one output.</param>
public readonly record struct Verdict(Decision Decision, Outcome Outcome);
