using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

/// <summary>A clock on which a test acts each time it is read: the sender reads it between its steps, so that a test can put
/// a disarming exactly there.</summary>
internal sealed class ScriptedClock(VirtualClock clock) : IClock
{
    public Action OnRead { get; set; } = () => { };

    public double NowSeconds
    {
        get
        {
            OnRead();
            return clock.NowSeconds;
        }
    }

    public void WaitUntil(double instantSeconds) => clock.WaitUntil(instantSeconds);
}
