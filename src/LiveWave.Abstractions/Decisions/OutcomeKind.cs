namespace LiveWave.Abstractions;

/// <summary>What happened in the room after a decision.</summary>
public enum OutcomeKind
{
    /// <summary>A hold: nothing was due.</summary>
    NothingDue,

    /// <summary>A sham: it took gate, slot and sender thread, and was withheld at the last instant.</summary>
    Withheld,

    /// <summary>A rehearsal: it took gate, slot and sender thread; the output was not asked, unless it is a dummy.</summary>
    Rehearsed,

    /// <summary>It left.</summary>
    Sent,

    /// <summary>It left and came back as an echo.</summary>
    Confirmed,

    /// <summary>It left and no echo came.</summary>
    NotConfirmed,

    /// <summary>The rig was not armed at the last instant.</summary>
    NotArmed,

    /// <summary>Its instant had passed.</summary>
    Late,

    /// <summary>A limit of the sheet stood against it.</summary>
    OverLimit,

    /// <summary>The output still had another one.</summary>
    OutputBusy,

    /// <summary>The run ended or was disarmed before its instant.</summary>
    Cancelled,

    /// <summary>The output failed.</summary>
    RefusedByOutput,
}
