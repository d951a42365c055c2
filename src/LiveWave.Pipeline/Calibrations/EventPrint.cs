namespace LiveWave.Pipeline;

/// <summary>The event settings that thresholds were calibrated with.</summary>
/// <param name="MinimumMs">How long a wave must last, ms.</param>
/// <param name="StabilityMs">Over how long its direction must be steady, ms.</param>
/// <param name="StabilityDegrees">Largest circular standard deviation of its direction in that time, degrees.</param>
/// <param name="GapMs">Longest weak stretch that does not end it, ms.</param>
/// <param name="RefractoryMs">After its end, how long no other event starts, ms.</param>
public sealed record EventPrint(double MinimumMs, double StabilityMs, double StabilityDegrees, double GapMs, double RefractoryMs);
