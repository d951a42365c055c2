namespace LiveWave.Abstractions;

/// <summary>Where samples come from: a stream, a file, a scene.</summary>
/// <remarks>Numbers rows consecutively from 0 and delivers raw stamps and clock measurements; correction, gaps and restarts are
/// the host's. Called from the decision thread only; <see cref="IDisposable.Dispose"/> may come from another and must free a
/// pull that waits.</remarks>
public interface IFeed : IDisposable
{
    /// <summary>Rate and channels.</summary>
    StreamFormat Format { get; }

    /// <summary>Brings the next rows. Does not allocate in steady state.</summary>
    /// <param name="into">Filled from <see cref="SampleBlock.Begin"/> on; left empty unless the result is <see cref="PullResult.Samples"/>.</param>
    /// <param name="atMost">Waits no longer than this.</param>
    PullResult Pull(SampleBlock into, TimeSpan atMost);
}
