namespace LiveWave.Pipeline;

/// <summary>What the gate lets through.</summary>
public enum GateState
{
    /// <summary>Nothing leaves: pulses and shams end as not armed.</summary>
    Disarmed,

    /// <summary>Pulses take the whole way and are not sent; only an output marked as a dummy is driven, each pulse marked.</summary>
    Rehearsing,

    /// <summary>Pulses leave, within limits and on time.</summary>
    Armed,
}
