namespace LiveWave.Pipeline;

/// <summary>Where a pulse slot is on its one round.</summary>
internal enum SlotState
{
    /// <summary>Free. Only the decision thread leaves it, to pending.</summary>
    Empty,

    /// <summary>A pulse waits for its instant. The sender moves it to sending, whoever cancels it to ending.</summary>
    Pending,

    /// <summary>The sender asks its last questions, or is inside the driver.</summary>
    Sending,

    /// <summary>Whoever moved it here, and nobody else, writes the outcome.</summary>
    Ending,

    /// <summary>The outcome stands. Only the decision thread leaves it, to empty.</summary>
    Done,
}
