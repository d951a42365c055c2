using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public sealed class OscillatorEstimatorLaws : PhaseEstimatorLaws
{
    protected override IPhaseEstimator Create() => new OscillatorEstimator();

    protected override Calibration Calibration(int channelCount) =>
        PhaseModels.Calibration(PhaseModels.Full, [.. Enumerable.Range(1, channelCount).Select(i => 2.0 * i)]);
}
