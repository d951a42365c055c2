using System.Diagnostics;

namespace LiveWave.Pipeline;

/// <summary>Sleeps by the runtime's timed wait: for platforms without a wait of their own here.</summary>
internal sealed class PortableWait : ICoarseWait, IDisposable
{
    private readonly ManualResetEvent _never = new(initialState: false);

    /// <inheritdoc/>
    public string Lacks =>
        "this platform has no precise wait here: it sleeps by the ordinary timer and spins the last 16 ms, "
        + "and a pulse whose instant is overslept ends as late and is not sent";

    /// <inheritdoc/>
    /// <remarks>One step of the coarsest ordinary timer (15.6 ms): a shorter spin would be overslept there.</remarks>
    public double SpinSeconds => 16e-3;

    /// <inheritdoc/>
    public void Sleep(long nowTicks, long untilTicks)
    {
        var milliseconds = (untilTicks - nowTicks) * 1000 / Stopwatch.Frequency;   // whole ones, rounded down
        if (milliseconds > 0) _ = _never.WaitOne((int)Math.Min(milliseconds, 60_000));
    }

    /// <inheritdoc/>
    public void Dispose() => _never.Dispose();
}
