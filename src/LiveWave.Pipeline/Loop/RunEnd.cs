namespace LiveWave.Pipeline;

/// <summary>Why a run is over.</summary>
public enum RunEnd
{
    /// <summary>It is not over.</summary>
    None,

    /// <summary>The recording ended.</summary>
    Ended,

    /// <summary>As many rows were judged as were asked for.</summary>
    RowLimit,

    /// <summary>Somebody stopped it.</summary>
    Stopped,

    /// <summary>The stream was lost.</summary>
    Lost,

    /// <summary>A part failed.</summary>
    Fault,
}
