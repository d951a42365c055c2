namespace LiveWave.Dsp;

/// <summary>What can be wrong with a recording on purpose.</summary>
public enum SceneFaultKind
{
    /// <summary>Channels carry white noise of their own and nothing else.</summary>
    Bad,

    /// <summary>Channels fade while their noise grows, over the fault's duration; afterwards they are bad.</summary>
    Dying,

    /// <summary>The first two channels are exchanged.</summary>
    Swapped,

    /// <summary>Rows are lost.</summary>
    Gap,

    /// <summary>Channels can't leave ± the fault's microvolts.</summary>
    Saturation,

    /// <summary>A slow (0.5-8 Hz) large deflection, much the same on all channels.</summary>
    Movement,
}
