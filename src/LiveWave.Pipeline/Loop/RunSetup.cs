using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Everything that decides: what a run is made of, apart from feed, clock, gate and people.</summary>
/// <remarks>Holds factories, not parts, so that a clone for the warm-up is made of the same.</remarks>
public sealed record RunSetup
{
    /// <summary>The stream.</summary>
    public required StreamFormat Format { get; init; }

    /// <summary>The conditioners, in order.</summary>
    public IReadOnlyList<Func<IConditioner>> Conditioners { get; init; } = [];

    /// <summary>At least one.</summary>
    public required IReadOnlyList<PatchSetup> Patches { get; init; }

    /// <summary>Every band of every patch. Wave tracks are numbered in this order, from 0.</summary>
    public required IReadOnlyList<PhaseTrackSetup> Tracks { get; init; }

    /// <summary>The rules, in the sheet's order; may be empty.</summary>
    public IReadOnlyList<RuleSetup> Rules { get; init; } = [];

    /// <summary>The session's seed.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>The session's own name.</summary>
    public required string SessionId { get; init; }

    /// <summary>How long rows are marked as missing from a decision's due row on, ms.</summary>
    public double BlankAfterPulseMs { get; init; }
}
