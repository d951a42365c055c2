namespace LiveWave.Pipeline;

/// <summary>The <c>event</c> table of a wave estimator: when a wave has lasted.</summary>
public sealed record EventTable
{
    /// <summary>Evidence at which an event starts, at least -4; NaN: the calibration's threshold, or 5.0 without one.</summary>
    public required double Enter { get; init; }

    /// <summary>How long a wave must last, ms.</summary>
    public required double MinimumMs { get; init; }

    /// <summary>Over how long its direction must be steady, ms.</summary>
    public required double StabilityMs { get; init; }

    /// <summary>Largest circular standard deviation of its direction in that time, degrees, above 0, at most 180.</summary>
    public required double StabilityDegrees { get; init; }

    /// <summary>Longest weak stretch that does not end it, ms.</summary>
    public required double GapMs { get; init; }

    /// <summary>After its end, how long no other event starts, ms.</summary>
    public required double RefractoryMs { get; init; }
}
