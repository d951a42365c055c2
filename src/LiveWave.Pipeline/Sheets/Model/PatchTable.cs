using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A <c>[[patch]]</c> table: one array of electrodes on the stream.</summary>
public sealed record PatchTable
{
    /// <summary>How the patch is called.</summary>
    public required string Name { get; init; }

    /// <summary>Labels of its channels, in this order; empty: every channel of the stream that <see cref="Electrodes"/> names.</summary>
    public required IReadOnlyList<string> Channels { get; init; }

    /// <summary>The table of positions (BIDS <c>electrodes.tsv</c>), relative to the sheet.</summary>
    public required string Electrodes { get; init; }

    /// <summary>Unit of the positions: <c>mm</c>, <c>cm</c>, <c>m</c> or <c>um</c>.</summary>
    public required string Unit { get; init; }

    /// <summary>The view in which +x is right and +y is up.</summary>
    public required string SeenFrom { get; init; }

    /// <summary>Counter-clockwise turn from the array's own frame to that view, degrees, -360 to 360.</summary>
    public required double RotationDegrees { get; init; }

    /// <summary>Labels of channels that must not be used; may be empty.</summary>
    public required IReadOnlyList<string> BadChannels { get; init; }

    /// <summary>What <c>baseline</c> learnt, relative to the sheet; null: no calibration, so event thresholds are 5.0 and the run can't
    /// be armed. Where a sheet names a file, it may not exist yet.</summary>
    public required string? Calibration { get; init; }

    /// <summary>Names for directions, degrees counter-clockwise from +x after rotation; may be empty.</summary>
    public required IReadOnlyList<NamedAxis> Axes { get; init; }
}
