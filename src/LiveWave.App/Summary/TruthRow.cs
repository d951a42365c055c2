namespace LiveWave.App;

/// <summary>One line of a truth table: what was put into a synthetic recording.</summary>
/// <param name="OnsetSeconds">Since the first sample.</param>
/// <param name="DurationSeconds">How long.</param>
/// <param name="Kind">As our words call it.</param>
/// <param name="DirectionDegrees">NaN where there is none.</param>
/// <param name="IsStrong">At 6 dB or more and up to two apertures long.</param>
internal sealed record TruthRow(double OnsetSeconds, double DurationSeconds, string Kind, double DirectionDegrees, bool IsStrong)
{
    /// <summary>Filters end later than waves: an event may stay on for this long, seconds.</summary>
    public const double AfterSeconds = 0.150;

    public double UntilSeconds => OnsetSeconds + DurationSeconds + AfterSeconds;
}
