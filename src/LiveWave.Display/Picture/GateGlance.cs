using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>How the pulse gate stands.</summary>
/// <param name="State">What it lets through.</param>
/// <param name="PulsesUsed">Pulses it let through.</param>
/// <param name="Reason">Why it is disarmed; empty while it is not.</param>
internal readonly record struct GateGlance(GateState State, int PulsesUsed, string Reason);
