namespace LiveWave.Pipeline;

/// <summary>A <c>[[part]]</c> table: a stretch of the session's plan.</summary>
/// <remarks>Not built yet: a sheet that has one is refused.</remarks>
public sealed record PartTable
{
    /// <summary>How the part is called, e.g. wash-out.</summary>
    public required string Name { get; init; }

    /// <summary>How long it takes, minutes.</summary>
    public required double LengthMinutes { get; init; }
}
