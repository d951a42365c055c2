namespace LiveWave.Abstractions;

/// <summary>What follows from samples, sheet, calibration, seed and session id alone: one per rule and wave event.</summary>
public readonly record struct Decision
{
    /// <summary>Counted from 1 over the run.</summary>
    public long Number { get; init; }

    /// <summary>The rule.</summary>
    public string Rule { get; init; }

    /// <summary>The wave event's number.</summary>
    public long EventNumber { get; init; }

    /// <summary>The patch.</summary>
    public string Patch { get; init; }

    /// <summary>The band.</summary>
    public string Band { get; init; }

    /// <summary>Pulse, sham or hold.</summary>
    public DecisionKind Kind { get; init; }

    /// <summary>For a hold: the first failing condition at the event's best row.</summary>
    public Condition Failed { get; init; }

    /// <summary>The deciding row; for a hold the event's best row.</summary>
    public RowInstant At { get; init; }

    /// <summary>The row of the event's first frame.</summary>
    public RowInstant Onset { get; init; }

    /// <summary>The wave's kind at that row.</summary>
    public WaveKind Wave { get; init; }

    /// <summary>Direction at that row, degrees.</summary>
    public double DirectionDegrees { get; init; }

    /// <summary>Its standard error, degrees.</summary>
    public double DirectionStandardErrorDegrees { get; init; }

    /// <summary>Evidence at that row.</summary>
    public double Evidence { get; init; }

    /// <summary>Stamp for which the pulse is meant: stamp of the deciding row + horizon; NaN for a hold.</summary>
    public double DueSeconds { get; init; }

    /// <summary>The rule's code for its pulses.</summary>
    public int Code { get; init; }

    /// <summary>The lot drawn for it, [0, 1); a sham if below the rule's sham fraction. NaN for a hold.</summary>
    public double Lot { get; init; }

    /// <summary>Phase at the site predicted for the due instant, degrees; NaN where the rule aims at none.</summary>
    public double PredictedPhaseDegrees { get; init; }
}
