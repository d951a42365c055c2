namespace LiveWave.Abstractions;

/// <summary>What was learnt from a baseline about one patch in one band. Immutable.</summary>
public sealed class Calibration
{
    /// <summary>The threshold on the evidence where nothing was calibrated.</summary>
    public const double UncalibratedThreshold = 5.0;

    /// <summary>The patch.</summary>
    public required string Patch { get; init; }

    /// <summary>The band.</summary>
    public required string Band { get; init; }

    /// <summary>The phase model, null where none was learnt.</summary>
    public PhaseModel? PhaseModel { get; init; }

    /// <summary>Per channel of the patch: standard deviation of the offset-free channel, its unit; the phase model's variances
    /// are in units of its square. Empty where not known.</summary>
    public IReadOnlyList<double> ChannelScale { get; init; } = [];

    /// <summary>Per channel of the patch: root mean square modulus of its phasor in ordinary activity, its unit. Empty where not known.</summary>
    public IReadOnlyList<double> ChannelRms { get; init; } = [];

    /// <summary>Spatial covariance of the noise, null where none was learnt: then a field in phase all over the array can't be
    /// told from a wave in correlated noise.</summary>
    public NoiseModel? Noise { get; init; }

    /// <summary>Thresholds per kind; empty where nothing was calibrated.</summary>
    public IReadOnlyList<KindThreshold> Thresholds { get; init; } = [];

    /// <summary>A calibration that knows nothing.</summary>
    /// <param name="patch">The patch.</param>
    /// <param name="band">The band.</param>
    public static Calibration None(string patch, string band) => new() { Patch = patch, Band = band };

    /// <summary>The threshold of a kind, null where it was not calibrated.</summary>
    /// <param name="kind">The kind.</param>
    public KindThreshold? ThresholdOf(WaveKind kind) => Thresholds.FirstOrDefault(threshold => threshold.Kind == kind);
}
