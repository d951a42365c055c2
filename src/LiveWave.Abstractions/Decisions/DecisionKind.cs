namespace LiveWave.Abstractions;

/// <summary>What a rule does about a wave event.</summary>
public enum DecisionKind
{
    /// <summary>Nothing: a condition failed throughout.</summary>
    Hold,

    /// <summary>A pulse is due.</summary>
    Pulse,

    /// <summary>All conditions held and the lot says no pulse; treated as a pulse in every other way.</summary>
    Sham,
}
