namespace LiveWave.Abstractions;

/// <summary>Where markers come from. Called from the decision thread, never waits.</summary>
public interface IMarkerFeed : IDisposable
{
    /// <summary>Takes the next marker that has arrived.</summary>
    /// <param name="marker">The marker.</param>
    /// <returns>False if there is none.</returns>
    bool TryTake(out Marker marker);
}
