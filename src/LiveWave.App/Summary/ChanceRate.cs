using LiveWave.Abstractions;

namespace LiveWave.App;

/// <summary>How often events of a kind come by chance.</summary>
/// <param name="Where">Patch and band.</param>
/// <param name="Threshold">The threshold with the rates measured at it.</param>
internal sealed record ChanceRate(string Where, KindThreshold Threshold);
