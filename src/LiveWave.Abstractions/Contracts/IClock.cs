namespace LiveWave.Abstractions;

/// <summary>The clock of a run: real, or virtual in tests and in runs as fast as possible.</summary>
public interface IClock
{
    /// <summary>Now, seconds; monotonic. Does not allocate.</summary>
    double NowSeconds { get; }

    /// <summary>Waits until an instant, never returning before it.</summary>
    /// <param name="instantSeconds">Seconds of this clock; returns at once if it has passed.</param>
    void WaitUntil(double instantSeconds);
}
