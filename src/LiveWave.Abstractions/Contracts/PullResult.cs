namespace LiveWave.Abstractions;

/// <summary>What a pull brought.</summary>
public enum PullResult
{
    /// <summary>Rows.</summary>
    Samples,

    /// <summary>Nothing within the time allowed.</summary>
    Nothing,

    /// <summary>The stream is over; nothing will follow.</summary>
    Ended,

    /// <summary>The stream was lost; it may come back.</summary>
    Lost,
}
