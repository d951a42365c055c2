using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class DecimatorLaws : ConditionerLaws
{
    protected override IConditioner Create() => new Decimator(analysisRateHz: 250);
}
