using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What surrounds the decisions of a run.</summary>
public sealed record RunParts
{
    /// <summary>Where rows come from.</summary>
    public required IFeed Feed { get; init; }

    /// <summary>The run's clock: the one in which stamps are.</summary>
    public required IClock Clock { get; init; }

    /// <summary>A real clock, for computing times, also where <see cref="Clock"/> is virtual.</summary>
    public required IClock Stopwatch { get; init; }

    /// <summary>The pulse gate.</summary>
    public required PulseGate Gate { get; init; }

    /// <summary>Who listens.</summary>
    public required RunSurface Surface { get; init; }

    /// <summary>What people should know.</summary>
    public required StatusBoard Board { get; init; }

    /// <summary>The latency budget.</summary>
    public required LatencyLedger Ledger { get; init; }

    /// <summary>Where phasors are shown to whoever looks, one per track of the setup; empty: nobody looks.</summary>
    public IReadOnlyList<PhaseSnapshot> Watched { get; init; } = [];

    /// <summary>Most rows a pull may bring.</summary>
    public int BlockRows { get; init; } = 32;

    /// <summary>Rows to judge; then the run ends.</summary>
    public long RowLimit { get; init; } = long.MaxValue;

    /// <summary>Tests: rows are spoilt after publishing, so that whoever kept a block fails at once.</summary>
    public bool Checks { get; init; }
}
