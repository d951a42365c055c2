using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>The conditioners and estimators that come with the program.</summary>
public sealed class BuiltInEstimators : IPlugin
{
    /// <inheritdoc/>
    public void Register(IPluginCatalog catalog)
    {
        ArgumentNullException.ThrowIfNull(catalog);
        catalog.Add<IConditioner>("mains-notch", options => new MainsNotch(options.Number("mainsHz", 50, 1, 1000)));
        catalog.Add<IConditioner>("decimator", options => new Decimator(options.Number("analysisRateHz", 1000, 20, 20_000)));
        catalog.Add<IPhaseEstimator>("oscillator", _ => new OscillatorEstimator());
        catalog.Add<IPhaseEstimator>(
            "bandpass-quadrature", options => new BandpassQuadratureEstimator((int)options.Number("order", 2, 1, 8)));
        catalog.Add<IWaveEstimator>("planar", options => new PlanarEstimator(PlanarOptions.From(options)));
    }
}
