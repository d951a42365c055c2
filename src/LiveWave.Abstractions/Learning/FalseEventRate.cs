namespace LiveWave.Abstractions;

/// <summary>How often a threshold was passed where no wave was: events a minute with a 95 % Poisson interval.</summary>
/// <param name="PerMinute">The rate.</param>
/// <param name="LowPerMinute">Lower end of the interval.</param>
/// <param name="HighPerMinute">Upper end of the interval.</param>
/// <param name="Count">Events counted.</param>
/// <param name="Minutes">In so many minutes.</param>
public sealed record FalseEventRate(double PerMinute, double LowPerMinute, double HighPerMinute, int Count, double Minutes);
