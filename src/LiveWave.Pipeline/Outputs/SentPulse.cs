using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A pulse as a <see cref="MemoryOutput"/> received it.</summary>
/// <param name="Pulse">The pulse.</param>
/// <param name="AtSeconds">When it arrived, the run's clock.</param>
public readonly record struct SentPulse(Pulse Pulse, double AtSeconds);
