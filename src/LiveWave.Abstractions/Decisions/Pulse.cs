namespace LiveWave.Abstractions;

/// <summary>One outgoing trigger.</summary>
public readonly record struct Pulse
{
    /// <summary>Number of the decision it follows from.</summary>
    public long Decision { get; init; }

    /// <summary>When it is meant to act, seconds of our clock.</summary>
    public double DueSeconds { get; init; }

    /// <summary>The rule's code.</summary>
    public int Code { get; init; }

    /// <summary>The rule.</summary>
    public string Rule { get; init; }

    /// <summary>The wave event's number.</summary>
    public long EventNumber { get; init; }

    /// <summary>Phase at the site predicted for the due instant, degrees; NaN where the rule aims at none.</summary>
    public double PredictedPhaseDegrees { get; init; }

    /// <summary>It is a rehearsal, driven into an output that the sheet marks as a dummy.</summary>
    public bool IsRehearsal { get; init; }
}
