namespace LiveWave.Abstractions;

/// <summary>One comparison of a stream's clock with ours.</summary>
/// <param name="FromReceived">Number of the first row for which it was known.</param>
/// <param name="TakenSeconds">Our clock when it was taken.</param>
/// <param name="RemoteSeconds">The stream's clock at that instant.</param>
/// <param name="OffsetSeconds">To be added to the stream's stamps to reach our clock.</param>
/// <param name="UncertaintySeconds">Half the round trip, or 0 where both clocks are the same.</param>
public readonly record struct ClockMeasurement(
    long FromReceived, double TakenSeconds, double RemoteSeconds, double OffsetSeconds, double UncertaintySeconds);
