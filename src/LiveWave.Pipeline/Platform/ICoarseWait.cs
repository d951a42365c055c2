namespace LiveWave.Pipeline;

/// <summary>The sleeping part of a precise wait. The clock spins the rest, so it may come back early, and should never
/// come back late.</summary>
internal interface ICoarseWait
{
    /// <summary>What this platform's wait lacks, in one sentence for people; empty where it lacks nothing.</summary>
    string Lacks { get; }

    /// <summary>How long before the instant the clock should begin to spin, seconds.</summary>
    double SpinSeconds { get; }

    /// <summary>Sleeps on the calling thread until about an instant. Does not allocate.</summary>
    /// <param name="nowTicks">Now, stopwatch ticks.</param>
    /// <param name="untilTicks">The instant, stopwatch ticks.</param>
    void Sleep(long nowTicks, long untilTicks);
}
