namespace LiveWave.Pipeline;

/// <summary>The <c>[session]</c> table: the run itself.</summary>
public sealed record SessionTable
{
    /// <summary>How the session is called; typed to arm it.</summary>
    public required string Name { get; init; }

    /// <summary>The experimenter's notes, without identities; may be empty.</summary>
    public required string Notes { get; init; }

    /// <summary>Keys the lots that choose between pulse and sham.</summary>
    public required ulong Seed { get; init; }
}
