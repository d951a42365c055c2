namespace LiveWave.Abstractions;

/// <summary>What then happened, at one output. Never flows back to decisions.</summary>
/// <param name="Decision">The decision's number.</param>
/// <param name="Output">The output's name; empty for a hold.</param>
/// <param name="Kind">What happened.</param>
/// <param name="Stages">When it passed each stage.</param>
/// <param name="Collections">Garbage collections between its row's arrival and its end.</param>
/// <param name="PauseSeconds">How long they stopped the process.</param>
public readonly record struct Outcome(
    long Decision, string Output, OutcomeKind Kind, StageStamps Stages, int Collections, double PauseSeconds);
