namespace LiveWave.Dsp;

/// <summary>What stays the same between two recordings of one rig: gains and offsets of its channels, and the field of its rhythm.</summary>
/// <param name="GainLogSd">Standard deviation of the logarithm of the channels' gains.</param>
/// <param name="OffsetMicrovolts">Standard deviation of the electrodes' offsets.</param>
/// <param name="Seed">Keys these lots: two scenes of one rig share it. Null: the scene's own.</param>
public sealed record SceneRig(double GainLogSd = 0, double OffsetMicrovolts = 0, ulong? Seed = null);
