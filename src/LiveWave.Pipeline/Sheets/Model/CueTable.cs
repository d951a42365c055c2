namespace LiveWave.Pipeline;

/// <summary>A <c>[[cue]]</c> table: a marker or a line that comes in from the task.</summary>
/// <remarks>Not built yet: a sheet that has one is refused.</remarks>
public sealed record CueTable
{
    /// <summary>How the cue is called.</summary>
    public required string Name { get; init; }

    /// <summary>The text of the marker; null where the cue is a data line.</summary>
    public required string? Marker { get; init; }

    /// <summary>The data channel; null where the cue is a marker.</summary>
    public required string? Channel { get; init; }

    /// <summary>What it is for: <c>record</c>, <c>echo</c> or <c>rule</c>.</summary>
    public required string Use { get; init; }
}
