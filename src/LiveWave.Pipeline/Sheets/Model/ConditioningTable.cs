namespace LiveWave.Pipeline;

/// <summary>The <c>[conditioning]</c> table: what is done to rows before their phase is estimated.</summary>
public sealed record ConditioningTable
{
    /// <summary>Mains frequency that is taken out, Hz: 0 (none), 50 or 60.</summary>
    public required double MainsHz { get; init; }

    /// <summary>Rows a second after decimation, Hz; NaN: not decimated.</summary>
    public required double AnalysisRateHz { get; init; }

    /// <summary>How long samples count as missing from a decision's due row on, ms; 0: none. Pulse and sham alike.</summary>
    public required double BlankAfterPulseMs { get; init; }
}
