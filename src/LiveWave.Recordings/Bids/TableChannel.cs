namespace LiveWave.Recordings;

/// <summary>One row of a BIDS <c>channels.tsv</c>.</summary>
/// <param name="Name">As the recording calls the channel.</param>
/// <param name="Type">What it carries, e.g. <c>ECOG</c>; empty where the table doesn't say.</param>
/// <param name="Units">Unit of its values; empty where the table doesn't say.</param>
/// <param name="IsGood">False if its status is <c>bad</c>; null where the table doesn't say.</param>
public sealed record TableChannel(string Name, string Type, string Units, bool? IsGood);
