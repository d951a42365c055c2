using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Delivers a recording as fast as it can be judged, on a virtual clock that stands at the newest stamp of each block.</summary>
/// <remarks>Before the clock moves on to a block it is stepped from one due pulse to the next, and every sender gets its turn at
/// its instant: pulses are rehearsed as punctually as on an ideal machine, however fast the recording is read.</remarks>
/// <param name="inner">The recording.</param>
/// <param name="clock">The run's clock, in the recording's own stamps.</param>
/// <param name="gate">Whose pulses are waited for.</param>
public sealed class SteppedFeed(IFeed inner, VirtualClock clock, PulseGate gate) : IFeed
{
    private static readonly TimeSpan SenderPatience = TimeSpan.FromSeconds(2);

    /// <inheritdoc/>
    public StreamFormat Format => inner.Format;

    /// <inheritdoc/>
    public PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        var result = inner.Pull(into, atMost);
        if (result == PullResult.Samples)
        {
            var newest = into.RawStampSeconds(into.Count - 1);
            StepDueUntil(newest);
            clock.MoveTo(newest);
        }

        return result;
    }

    /// <inheritdoc/>
    public void Dispose() => inner.Dispose();

    private void StepDueUntil(double newest)
    {
        // What the last block committed may be at its last instant already, where it is no longer pending.
        if (!gate.AwaitSettled(SenderPatience)) return;
        for (var due = gate.NextDueSeconds; due <= newest; due = gate.NextDueSeconds)
        {
            clock.MoveTo(due);
            if (!gate.AwaitSettled(SenderPatience)) return;   // an output that hangs: the gate's patience deals with it
        }
    }
}
