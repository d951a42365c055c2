namespace LiveWave.Abstractions;

/// <summary>A wave event goes quiet → forming → passing → quiet.</summary>
public enum WaveEventState
{
    /// <summary>Nothing, or the event is over.</summary>
    Quiet,

    /// <summary>Evidence is there, not yet for long enough or not yet steady.</summary>
    Forming,

    /// <summary>The event is on.</summary>
    Passing,
}
