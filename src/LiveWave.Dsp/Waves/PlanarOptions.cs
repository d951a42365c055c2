using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What a sheet may say to the planar estimator.</summary>
/// <param name="EveryMs">Milliseconds between frames; 0: as near to 250 frames a second as the rate allows.</param>
/// <param name="ShortestWavelengthMm">Shortest wavelength looked for, mm, at least two pitches; 0: the larger of 2.5 pitches and half
/// the aperture.</param>
/// <param name="GainOverUniform">First gate: least dL, 0.5 to 50.</param>
/// <param name="GainOutOfPhase">Second gate: least Lq.</param>
/// <param name="SlowestWaveMetresPerSecond">Slowest wave of interest, m/s: a uniform field is called synchronous where all waves of at
/// least that speed are excluded too; 0: not named, no frame is.</param>
public sealed record PlanarOptions(
    double EveryMs = 0,
    double ShortestWavelengthMm = 0,
    double GainOverUniform = 6,
    double GainOutOfPhase = 4,
    double SlowestWaveMetresPerSecond = 0)
{
    /// <summary>Reads the options of a sheet: <c>everyMs</c>, <c>shortestWavelengthMm</c>, <c>gainOverUniform</c>,
    /// <c>gainOutOfPhase</c>, <c>slowestWaveMetresPerSecond</c>.</summary>
    /// <param name="options">The sheet's table.</param>
    /// <exception cref="RefusedException">A value has the wrong type or lies outside its limits.</exception>
    public static PlanarOptions From(PluginOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        var usual = new PlanarOptions();
        return new PlanarOptions(
            options.Number("everyMs", usual.EveryMs, 0, 1000),
            options.Number("shortestWavelengthMm", usual.ShortestWavelengthMm, 0, 1e6),
            options.Number("gainOverUniform", usual.GainOverUniform, 0.5, 50),
            options.Number("gainOutOfPhase", usual.GainOutOfPhase, 0, 1000),
            options.Number("slowestWaveMetresPerSecond", usual.SlowestWaveMetresPerSecond, 0, 1000));
    }
}
