namespace LiveWave.Pipeline;

/// <summary>What the sheet's <c>[limits]</c> allow. Each holds in stamp time and on the run's monotonic clock.</summary>
/// <remarks>A pulse to several outputs counts once. Shams and pulses that were not sent don't count; one that an output
/// failed on does.</remarks>
public sealed record GateLimits
{
    /// <summary>Pulses in any 60 s, 0 to 100 000; null: not limited.</summary>
    public int? PulsesPerMinute { get; init; }

    /// <summary>Pulses in the session, 0 and up; null: not limited.</summary>
    public int? PulsesPerSession { get; init; }

    /// <summary>Shortest time from one pulse to the next, ms, 0 and up; null: not limited.</summary>
    public double? ShortestIntervalMs { get; init; }

    /// <summary>Longest run, minutes from the gate's making, 0 and up; null: not limited.</summary>
    public double? LongestRunMinutes { get; init; }

    /// <summary>How old the deciding row may be when the pulse leaves, ms from its stamp, 0 and up; null: not limited.</summary>
    public double? OldestDataMs { get; init; }

    internal void RefuseNonsense()
    {
        if (PulsesPerMinute is < 0 or > 100_000)
            throw new ArgumentOutOfRangeException(nameof(PulsesPerMinute), PulsesPerMinute, "pulses per minute are 0 to 100000");
        if (PulsesPerSession is < 0)
            throw new ArgumentOutOfRangeException(nameof(PulsesPerSession), PulsesPerSession, "pulses per session are 0 or more");
        RefuseNonsense(ShortestIntervalMs, nameof(ShortestIntervalMs), "ms");
        RefuseNonsense(LongestRunMinutes, nameof(LongestRunMinutes), "minutes");
        RefuseNonsense(OldestDataMs, nameof(OldestDataMs), "ms");
    }

    private static void RefuseNonsense(double? value, string name, string unit)
    {
        if (value is { } given && !(double.IsFinite(given) && given >= 0))
            throw new ArgumentOutOfRangeException(name, given, $"a limit is finite and 0 {unit} or more");
    }
}
