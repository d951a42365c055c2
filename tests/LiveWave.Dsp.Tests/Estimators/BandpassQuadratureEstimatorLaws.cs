using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public sealed class BandpassQuadratureEstimatorLaws : PhaseEstimatorLaws
{
    protected override IPhaseEstimator Create() => new BandpassQuadratureEstimator();

    protected override Calibration Calibration(int channelCount) => Abstractions.Calibration.None("A", "alpha");
}
