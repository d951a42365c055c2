namespace LiveWave.Pipeline;

/// <summary>The <c>[stream]</c> table: where the samples come from and what they must look like.</summary>
public sealed record StreamTable
{
    /// <summary>The recording, relative to the sheet.</summary>
    public required string? File { get; init; }

    /// <summary>The stream's name in the file; null: the only stream of samples in it.</summary>
    public required string? Name { get; init; }

    /// <summary>Rows a second that the stream must have; NaN: as it says.</summary>
    public required double RateHz { get; init; }

    /// <summary>Channels that the stream must have; null: as it says.</summary>
    public required int? Channels { get; init; }
}
