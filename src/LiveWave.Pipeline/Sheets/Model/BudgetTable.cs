namespace LiveWave.Pipeline;

/// <summary>The <c>[budget]</c> table: longest computing time of each stage, ms, above 0.</summary>
public sealed record BudgetTable
{
    /// <summary>Of conditioning and phase.</summary>
    public required double PhasedMs { get; init; }

    /// <summary>Of the wave estimators.</summary>
    public required double ReadMs { get; init; }

    /// <summary>Of events, rules and decision.</summary>
    public required double DecidedMs { get; init; }

    /// <summary>Of everything from receiving to deciding.</summary>
    public required double InAllMs { get; init; }
}
