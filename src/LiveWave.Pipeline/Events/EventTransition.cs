namespace LiveWave.Pipeline;

/// <summary>What one frame did to the wave event of a patch, band and estimator. Several may happen at once, in this order: an event
/// ends in a stretch of missing frames, and the frame after it forms the next.</summary>
[Flags]
internal enum EventTransition
{
    /// <summary>Nothing changed.</summary>
    Nothing = 0,

    /// <summary>An event that had formed was over before it passed.</summary>
    Faded = 1,

    /// <summary>An event that had passed is over.</summary>
    Ended = 2,

    /// <summary>An event forms.</summary>
    Formed = 4,

    /// <summary>The event passes: long and steady enough.</summary>
    Passed = 8,
}
