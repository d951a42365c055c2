namespace LiveWave.Abstractions;

/// <summary>What a frame or an event is. The first seven travel.</summary>
public enum WaveKind
{
    /// <summary>Straight crests in one direction.</summary>
    Planar,

    /// <summary>Turns counter-clockwise about a centre.</summary>
    RotatingCounterClockwise,

    /// <summary>Turns clockwise about a centre.</summary>
    RotatingClockwise,

    /// <summary>Spreads from a centre.</summary>
    Expanding,

    /// <summary>Shrinks to a centre.</summary>
    Contracting,

    /// <summary>Travels without an oscillation.</summary>
    Front,

    /// <summary>Nodes and bellies that stand still.</summary>
    Standing,

    /// <summary>A zero-lag field of some shape, as volume conduction makes it.</summary>
    InPhase,

    /// <summary>The same phase everywhere, with the waves of interest excluded.</summary>
    Synchronous,

    /// <summary>A common rhythm that may be uniform or a wave too long or fast for this array.</summary>
    NotResolved,

    /// <summary>No common rhythm.</summary>
    None,
}
