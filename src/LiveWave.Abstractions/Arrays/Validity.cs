namespace LiveWave.Abstractions;

/// <summary>What a phasor rests on; travels with it, per channel.</summary>
public enum Validity : byte
{
    /// <summary>Longer without a sample than a model may bridge, no baseline, or just started: no evidence, not for aiming.</summary>
    Invalid,

    /// <summary>A model ran on through missing samples: fit for display and for keeping an aim, no evidence.</summary>
    Bridged,

    /// <summary>The row's own sample was used.</summary>
    Observed,
}
