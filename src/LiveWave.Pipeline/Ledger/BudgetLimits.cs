namespace LiveWave.Pipeline;

/// <summary>How long computing may take, ms per stage and in all.</summary>
/// <param name="PhasedMs">From received to the row's phasors.</param>
/// <param name="ReadMs">From there to the row's reading.</param>
/// <param name="DecidedMs">From there to the decision.</param>
/// <param name="InAllMs">From received to the last row of the block judged.</param>
public sealed record BudgetLimits(double PhasedMs = 0.3, double ReadMs = 0.6, double DecidedMs = 1, double InAllMs = 1);
