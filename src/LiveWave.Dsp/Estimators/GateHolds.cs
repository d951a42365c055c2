namespace LiveWave.Dsp;

/// <summary>How long phasors stay invalid, counted in rows with a sample, although there are samples again.</summary>
/// <param name="StartSeconds">After the channel's first sample.</param>
/// <param name="AfterGapSeconds">After a gap too long to bridge.</param>
/// <param name="AfterForgettingSeconds">After a gap so long that the channel began anew.</param>
internal readonly record struct GateHolds(double StartSeconds, double AfterGapSeconds, double AfterForgettingSeconds)
{
    /// <summary>After a start with an offset block that is cold: 1 s (phase study, section 7).</summary>
    internal const double OffsetStartSeconds = 1;

    /// <summary>After the offset block was settled anew in a running stream: 0.3 s (phase study, section 7).</summary>
    internal const double OffsetRestartSeconds = 0.3;
}
