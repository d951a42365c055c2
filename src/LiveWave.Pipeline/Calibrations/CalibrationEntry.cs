using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What a calibration file holds for one patch in one band.</summary>
/// <param name="Calibration">What estimators and events are given.</param>
/// <param name="Fingerprint">What it was learnt with, and holds for.</param>
/// <param name="Unit">Unit of the channels' scale and r.m.s., e.g. <c>microvolts</c>.</param>
/// <param name="PatchChannels">Labels of all channels of the patch, in order: the places of <see cref="Abstractions.Calibration.ChannelScale"/>
/// and <see cref="Abstractions.Calibration.ChannelRms"/>. The good ones among them are the fingerprint's channels.</param>
/// <param name="NoiseFrames">Frames the noise was learnt from; 0 where not stated.</param>
public sealed record CalibrationEntry(
    Calibration Calibration, CalibrationFingerprint Fingerprint, string Unit, IReadOnlyList<string> PatchChannels, int NoiseFrames);
