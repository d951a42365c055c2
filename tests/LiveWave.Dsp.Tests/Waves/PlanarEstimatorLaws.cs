using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class PlanarEstimatorLaws : WaveEstimatorLaws
{
    protected override IWaveEstimator Create() => new PlanarEstimator();
}
