namespace LiveWave.Abstractions;

/// <summary>From which evidence on a kind of wave may begin an event.</summary>
/// <param name="Kind">The kind.</param>
/// <param name="EnterBySector">One threshold per direction sector (sector 0 centred on 0°, counter-clockwise), or a single one.</param>
/// <param name="NominalPerMinute">The rate of false events it was chosen for; NaN where it was not calibrated.</param>
/// <param name="Surrogate">The rate on a held-out surrogate, null if not measured.</param>
/// <param name="Baseline">The rate on the baseline itself, null if not measured.</param>
public sealed record KindThreshold(
    WaveKind Kind, IReadOnlyList<double> EnterBySector, double NominalPerMinute, FalseEventRate? Surrogate, FalseEventRate? Baseline);
