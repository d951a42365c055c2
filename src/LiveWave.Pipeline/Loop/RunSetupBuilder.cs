using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Makes the setup of a run from a sheet, the stream's format, the patches and what was calibrated.</summary>
/// <param name="sheet">The sheet.</param>
/// <param name="format">The stream.</param>
/// <param name="catalog">Built-in and plugged-in parts.</param>
/// <param name="clock">The run's clock, handed to parts.</param>
public sealed class RunSetupBuilder(SessionSheet sheet, StreamFormat format, PartCatalog catalog, IClock clock)
{
    /// <summary>Puts it together.</summary>
    /// <param name="patches">One per patch of the sheet, in its order.</param>
    /// <param name="calibrationOf">What was learnt for a patch (by number) and band; never null.</param>
    /// <param name="sessionId">The session's own name.</param>
    /// <exception cref="RefusedException">Sheet, stream and layout don't go together.</exception>
    public RunSetup Build(IReadOnlyList<PatchSetup> patches, Func<int, BandTable, Calibration> calibrationOf, string sessionId)
    {
        ArgumentNullException.ThrowIfNull(patches);
        ArgumentNullException.ThrowIfNull(calibrationOf);
        var tracks = new List<PhaseTrackSetup>();
        var numbers = new Dictionary<(string Patch, string Band, string Wave), int>();
        for (var patch = 0; patch < patches.Count; patch++)
        {
            foreach (var band in sheet.Bands)
            {
                foreach (var wave in band.Waves) numbers.Add((patches[patch].Name, band.Name, wave.Estimator), numbers.Count);
                tracks.Add(Track(patch, band, calibrationOf(patch, band)));
            }
        }

        return new RunSetup
        {
            Format = format,
            Conditioners = Conditioners(),
            Patches = patches,
            Tracks = tracks,
            Rules = [.. sheet.Rules.Select(rule => Rule(rule, numbers))],
            Seed = (ulong)sheet.Session.Seed,
            SessionId = sessionId,
            BlankAfterPulseMs = sheet.Conditioning.BlankAfterPulseMs,
        };
    }

    private List<Func<IConditioner>> Conditioners()
    {
        var made = new List<Func<IConditioner>>();
        if (sheet.Conditioning.MainsHz > 0)
        {
            made.Add(Maker<IConditioner>("mains-notch", "conditioning", ("mainsHz", sheet.Conditioning.MainsHz)));
        }

        if (double.IsFinite(sheet.Conditioning.AnalysisRateHz))
        {
            made.Add(Maker<IConditioner>("decimator", "conditioning", ("analysisRateHz", sheet.Conditioning.AnalysisRateHz)));
        }

        return made;
    }

    private PhaseTrackSetup Track(int patch, BandTable band, Calibration calibration)
    {
        var where = $"band '{band.Name}'";
        var phase = band.Phase.Estimator == "bandpass-quadrature"
            ? Maker<IPhaseEstimator>(band.Phase.Estimator, where, ("order", (double)band.Phase.Order))
            : Maker<IPhaseEstimator>(band.Phase.Estimator, where);
        return new PhaseTrackSetup(
            patch, new Band(band.Name, band.LowHz, band.HighHz, []), calibration, phase, [.. band.Waves.Select(wave => Wave(wave, where))]);
    }

    private WaveTrackSetup Wave(WaveTable wave, string where)
    {
        var options = new List<(string, object)>
        {
            ("everyMs", wave.EveryMs), ("gainOverUniform", wave.GainOverUniform), ("gainOutOfPhase", wave.GainOutOfPhase),
        };
        if (double.IsFinite(wave.ShortestWavelengthMm)) options.Add(("shortestWavelengthMm", wave.ShortestWavelengthMm));
        if (double.IsFinite(wave.SlowestWaveMetresPerSecond)) options.Add(("slowestWaveMetresPerSecond", wave.SlowestWaveMetresPerSecond));
        return new WaveTrackSetup(wave.Estimator, Maker<IWaveEstimator>(wave.Estimator, $"{where}, wave '{wave.Estimator}'", [.. options]), wave.Event);
    }

    private RuleSetup Rule(RuleTable rule, Dictionary<(string Patch, string Band, string Wave), int> numbers) => new()
    {
        Name = rule.Name,
        Track = numbers[(rule.Patch, rule.Band, rule.Wave)],
        Kind = rule.Kind,
        DirectionDegrees = rule.DirectionDegrees,
        ToleranceDegrees = rule.ToleranceDegrees,
        StandardErrorDegrees = rule.StandardErrorDegrees,
        Evidence = double.IsNaN(rule.Evidence) ? double.NegativeInfinity : rule.Evidence,
        LeadMs = rule.LeadMs,
        RestMs = rule.RestMs,
        ShamFraction = rule.ShamFraction,
        Code = rule.Code,
        Outputs = [.. rule.Outputs.Select(NumberOfOutput)],
    };

    private int NumberOfOutput(string name)
    {
        for (var i = 0; i < sheet.Outputs.Count; i++)
        {
            if (sheet.Outputs[i].Name == name) return i;
        }

        throw new RefusedException($"no output is called '{name}'", sheet.File, "name one of the sheet's outputs");
    }

    private Func<T> Maker<T>(string name, string where, params (string Key, object Value)[] options)
        where T : class
    {
        var values = options.ToDictionary(option => option.Key, option => option.Value, StringComparer.Ordinal);
        return () => catalog.Make<T>(name, new PluginOptions($"{sheet.File}, {where}", values, clock));
    }
}
