namespace LiveWave.Pipeline;

/// <summary>The <c>[limits]</c> table: what the pulse gate never lets pass. All limits are given, or the table is absent.</summary>
public sealed record LimitsTable
{
    /// <summary>Most pulses in any minute, at least 1.</summary>
    public required int PulsesPerMinute { get; init; }

    /// <summary>Most pulses in the session, at least 1.</summary>
    public required int PulsesPerSession { get; init; }

    /// <summary>Shortest time between two pulses, ms, above 0.</summary>
    public required double ShortestIntervalMs { get; init; }

    /// <summary>Longest run, minutes, above 0.</summary>
    public required double LongestRunMinutes { get; init; }

    /// <summary>Oldest that a deciding row may be when its pulse leaves, ms from its stamp, above every rule's lead.</summary>
    public required double OldestDataMs { get; init; }
}
