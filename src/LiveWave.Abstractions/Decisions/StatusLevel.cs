namespace LiveWave.Abstractions;

/// <summary>How much a status matters.</summary>
public enum StatusLevel
{
    /// <summary>Good to know.</summary>
    Note,

    /// <summary>Something is less than it should be; the run goes on.</summary>
    Warning,

    /// <summary>Something failed; the run is disarmed.</summary>
    Fault,
}
