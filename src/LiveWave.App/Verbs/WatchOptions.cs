namespace LiveWave.App;

/// <summary>What the command line asks of <c>watch</c> and <c>demo</c>.</summary>
internal sealed record WatchOptions
{
    /// <summary>The verb, for summaries.</summary>
    public required string Verb { get; init; }

    public required string SheetPath { get; init; }

    /// <summary>A recording to play in place of the sheet's own; null: the sheet's.</summary>
    public string? From { get; init; }

    /// <summary>Stream seconds to judge; NaN: all.</summary>
    public double Seconds { get; init; } = double.NaN;

    /// <summary>Paced by the recording's stamps; false: as fast as it can be judged.</summary>
    public bool IsRealClock { get; init; }

    /// <summary>Shown on the terminal while it runs.</summary>
    public bool HasView { get; init; }

    public int BlockRows { get; init; } = 10;

    /// <summary>The session folder; null: a new one in the sheet's record folder.</summary>
    public string? Out { get; init; }

    public bool Json { get; init; }

    /// <summary>Null: made from the sheet's name and the time.</summary>
    public string? SessionId { get; init; }
}
