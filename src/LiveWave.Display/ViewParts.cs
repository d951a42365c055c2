using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>What a view looks at, beside the surface.</summary>
public sealed record ViewParts
{
    /// <summary>What the run is made of.</summary>
    public required RunSetup Setup { get; init; }

    /// <summary>The run; asked on the decision thread for rows and losses.</summary>
    public required StreamLoop Loop { get; init; }

    /// <summary>The run's budget; asked on the decision thread for the newest block.</summary>
    public required LatencyLedger Ledger { get; init; }

    /// <summary>How long each stage may take.</summary>
    public required BudgetLimits Limits { get; init; }

    /// <summary>Asked for its state and for pulses used; never told anything.</summary>
    public required PulseGate Gate { get; init; }

    /// <summary>Phasors, one snapshot per track of the setup; the same that the run was given.</summary>
    public required IReadOnlyList<PhaseSnapshot> Phases { get; init; }

    /// <summary>The calibration in a word or two, e.g. <c>calibrated</c>.</summary>
    public required string Calibration { get; init; }
}
