namespace LiveWave.Pipeline;

/// <summary>What the gate lets through from one change to the next. Every change makes a new one, so that 'the same
/// standing as when the pulse was committed' is one comparison of references, and arming again never revives a pulse.</summary>
/// <param name="state">What is let through.</param>
/// <param name="reason">Why it is disarmed; empty while it is not, and before the first reason.</param>
/// <param name="tally">Where its pulses are counted.</param>
internal sealed class GateStanding(GateState state, string reason, PulseTally tally)
{
    internal GateState State { get; } = state;

    internal string Reason { get; } = reason;

    internal PulseTally Tally { get; } = tally;
}
