namespace LiveWave.Pipeline;

/// <summary>The <c>[amplifier]</c> table: what happens between the electrode and a sample's stamp.</summary>
public sealed record AmplifierTable
{
    /// <summary>From the electrode to the stamp, ms; 0: the stamp is right, or nobody knows.</summary>
    public required double AcquisitionDelayMs { get; init; }

    /// <summary>Where that figure comes from, in words; may be empty.</summary>
    public required string AcquisitionDelayFrom { get; init; }
}
