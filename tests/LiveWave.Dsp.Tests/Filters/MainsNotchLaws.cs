using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public class MainsNotchLaws : ConditionerLaws
{
    protected override IConditioner Create() => new MainsNotch(mainsHz: 50);
}
