namespace LiveWave.Abstractions;

/// <summary>Where one channel's electrode lies.</summary>
/// <param name="Channel">Label of its channel.</param>
/// <param name="XMm">mm, to the right in the stated view.</param>
/// <param name="YMm">mm, upwards in the stated view.</param>
/// <param name="IsGood">False: recorded and shown, not used.</param>
public sealed record Electrode(string Channel, double XMm, double YMm, bool IsGood = true);
