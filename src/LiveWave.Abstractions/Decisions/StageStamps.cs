namespace LiveWave.Abstractions;

/// <summary>When a decision passed each stage, seconds of our clock; NaN for a stage it did not reach.</summary>
/// <param name="AcquiredSeconds">Corrected stamp of the deciding row.</param>
/// <param name="ReceivedSeconds">The pull that delivered it returned.</param>
/// <param name="PhasedSeconds">Its phasors stood.</param>
/// <param name="ReadSeconds">Its reading stood.</param>
/// <param name="DecidedSeconds">The decision was taken.</param>
/// <param name="DueSeconds">When the pulse was meant to act.</param>
/// <param name="SentSeconds">The output was asked, or would have been.</param>
/// <param name="EchoedSeconds">It came back.</param>
public readonly record struct StageStamps(
    double AcquiredSeconds,
    double ReceivedSeconds,
    double PhasedSeconds,
    double ReadSeconds,
    double DecidedSeconds,
    double DueSeconds,
    double SentSeconds,
    double EchoedSeconds);
