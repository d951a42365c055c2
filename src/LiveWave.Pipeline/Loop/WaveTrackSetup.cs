using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One wave estimator on one band of one patch, with its event settings.</summary>
/// <param name="Estimator">Its plain name.</param>
/// <param name="MakeWave">Makes it; called once for the run and once for its warm-up.</param>
/// <param name="Event">When a wave has lasted; an <c>enter</c> of NaN takes the calibration's thresholds.</param>
public sealed record WaveTrackSetup(string Estimator, Func<IWaveEstimator> MakeWave, EventTable Event);
