namespace LiveWave.Abstractions;

/// <summary>The conditions of a rule in the order in which they are judged. A hold names the first that failed.</summary>
public enum Condition
{
    /// <summary>All held.</summary>
    None,

    /// <summary>The wave is of the wanted kind.</summary>
    Kind,

    /// <summary>It travels into the wanted sector.</summary>
    Direction,

    /// <summary>Its direction is known well enough.</summary>
    StandardError,

    /// <summary>Its evidence is large enough.</summary>
    Evidence,

    /// <summary>Its speed, with its whole interval, is in range.</summary>
    Speed,

    /// <summary>The phase at the site is predicted for an instant in reach, and known well enough.</summary>
    Phase,

    /// <summary>Cue, power or movement permit it.</summary>
    Permit,

    /// <summary>Long enough since the rule's last pulse or sham.</summary>
    Rest,

    /// <summary>The calibration still fits.</summary>
    Calibration,
}
