using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One band of one patch: a phase estimator, and the wave estimators that read its phasors.</summary>
/// <param name="Patch">The patch, by number.</param>
/// <param name="Band">The band.</param>
/// <param name="Calibration">What was learnt for this patch and band.</param>
/// <param name="MakePhase">Makes the phase estimator; called once for the run and once for its warm-up.</param>
/// <param name="Waves">At least one.</param>
public sealed record PhaseTrackSetup(
    int Patch, Band Band, Calibration Calibration, Func<IPhaseEstimator> MakePhase, IReadOnlyList<WaveTrackSetup> Waves);
