namespace LiveWave.Pipeline;

/// <summary>The <c>[record]</c> table: what is recorded.</summary>
public sealed record RecordTable
{
    /// <summary>The folder that session folders are made in, relative to where the program is called.</summary>
    public required string Folder { get; init; }
}
