using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>The calibrations of a run: read, held against the run's own fingerprint, or said to be missing.</summary>
internal sealed class CalibrationChoice
{
    private readonly Dictionary<(int Patch, string Band), Calibration> _chosen = [];
    private readonly List<Status> _notes = [];
    private readonly List<string> _withoutNoise = [];
    private readonly List<ChanceRate> _chance = [];
    private readonly Dictionary<string, CalibrationFile> _files = new(StringComparer.Ordinal);

    /// <summary>What is worth knowing before the first block.</summary>
    public IReadOnlyList<Status> Notes => _notes;

    /// <summary>Patch and band pairs without a noise model.</summary>
    public IReadOnlyList<string> WithoutNoiseModel => _withoutNoise;

    /// <summary>How often events come by chance, as it was calibrated.</summary>
    public IReadOnlyList<ChanceRate> Chance => _chance;

    /// <summary>The files that were read.</summary>
    public IReadOnlyCollection<string> Files => _files.Keys;

    /// <exception cref="RefusedException">A calibration can't be read, or was made for something else.</exception>
    public static CalibrationChoice Make(SessionSheet sheet, IReadOnlyList<PatchSetup> patches, StreamFormat format)
    {
        var choice = new CalibrationChoice();
        for (var patch = 0; patch < patches.Count; patch++)
        {
            foreach (var band in sheet.Bands) choice.Choose(sheet, patch, patches[patch], band, format);
        }

        return choice;
    }

    public Calibration Of(int patch, BandTable band) => _chosen[(patch, band.Name)];

    /// <summary>The fingerprint of a run: what a calibration must have been made with to serve it.</summary>
    internal static CalibrationFingerprint Fingerprint(SessionSheet sheet, PatchSetup patch, BandTable band, StreamFormat format)
    {
        var wave = band.Waves[0];
        var good = patch.Layout.GoodChannels();
        return new CalibrationFingerprint
        {
            Channels = [.. good.Select(i => patch.Layout.Electrodes[i].Channel)],
            PositionsMm = [.. good.Select(i => (patch.Layout.Electrodes[i].XMm, patch.Layout.Electrodes[i].YMm))],
            RateHz = format.NominalRateHz,
            LowHz = band.LowHz,
            HighHz = band.HighHz,
            Conditioning = ConditioningWords(sheet.Conditioning),
            PhaseEstimator = PhaseWords(band.Phase),
            WaveEstimator = WaveWords(wave),
            SamplesPerFrame = (int)Math.Round(RowsASecond(sheet, format) * wave.EveryMs / 1000, MidpointRounding.AwayFromZero),
            Event = new EventPrint(
                wave.Event.MinimumMs, wave.Event.StabilityMs, wave.Event.StabilityDegrees, wave.Event.GapMs, wave.Event.RefractoryMs),
        };
    }

    private static double RowsASecond(SessionSheet sheet, StreamFormat format) =>
        double.IsFinite(sheet.Conditioning.AnalysisRateHz) ? sheet.Conditioning.AnalysisRateHz : format.NominalRateHz;

    private static List<string> ConditioningWords(ConditioningTable conditioning)
    {
        var words = new List<string>();
        if (conditioning.MainsHz > 0) words.Add($"mains-notch {conditioning.MainsHz} Hz");
        if (double.IsFinite(conditioning.AnalysisRateHz)) words.Add($"decimator {conditioning.AnalysisRateHz} Hz");
        return words;
    }

    private static string PhaseWords(PhaseTable phase) =>
        phase.Estimator == "bandpass-quadrature" ? $"{phase.Estimator} order {phase.Order}" : phase.Estimator;

    // The gates belong to what thresholds were calibrated with; the usual ones go without saying.
    private static string WaveWords(WaveTable wave)
    {
        var usual = new Dsp.PlanarOptions();
        var words = wave.Estimator;
        if (!wave.GainOverUniform.Equals(usual.GainOverUniform)) words += $" gainOverUniform {wave.GainOverUniform}";
        if (!wave.GainOutOfPhase.Equals(usual.GainOutOfPhase)) words += $" gainOutOfPhase {wave.GainOutOfPhase}";
        if (double.IsFinite(wave.ShortestWavelengthMm)) words += $" shortestWavelengthMm {wave.ShortestWavelengthMm}";
        return words;
    }

    private void Choose(SessionSheet sheet, int number, PatchSetup patch, BandTable band, StreamFormat format)
    {
        var where = $"patch '{patch.Name}', band '{band.Name}'";
        var calibration = Read(sheet, sheet.Patches[number], patch, band, format, where);
        if (calibration.Noise is null) _withoutNoise.Add(where);
        var used = WithOwnThreshold(calibration, band.Waves[0].Event.Enter);
        foreach (var threshold in used.Thresholds) _chance.Add(new ChanceRate(where, threshold));   // measured rates hold at the calibrated threshold alone
        _chosen.Add((number, band.Name), used);
    }

    private Calibration Read(SessionSheet sheet, PatchTable table, PatchSetup patch, BandTable band, StreamFormat format, string where)
    {
        if (table.Calibration is not { } name)
        {
            Note(where, $"no calibration: events begin at an evidence of {Calibration.UncalibratedThreshold}, their false rate is not known");
            return Calibration.None(patch.Name, band.Name);
        }

        var file = FileAt(sheet.PathOf(name));
        if (file.Find(patch.Name, band.Name) is null)
        {
            Note(where, $"{file.Path} holds no calibration for it: events begin at an evidence of {Calibration.UncalibratedThreshold}");
            return Calibration.None(patch.Name, band.Name);
        }

        var entry = file.Fitting(patch.Name, band.Name, Fingerprint(sheet, patch, band, format));
        var unit = format.Channels[patch.Channels[0]].Unit;
        if (!string.Equals(entry.Unit, unit, StringComparison.OrdinalIgnoreCase))
        {
            Note(where, $"the calibration is in {entry.Unit}, the stream in {unit}: spreads are not to be trusted if that is another size");
        }

        return entry.Calibration;
    }

    private CalibrationFile FileAt(string path)
    {
        if (_files.TryGetValue(path, out var known)) return known;
        var file = CalibrationFile.Read(path);
        _files.Add(path, file);
        return file;
    }

    private static Calibration WithOwnThreshold(Calibration calibration, double enter)
    {
        if (!double.IsFinite(enter)) return calibration;
        return new Calibration
        {
            Patch = calibration.Patch,
            Band = calibration.Band,
            PhaseModel = calibration.PhaseModel,
            ChannelScale = calibration.ChannelScale,
            ChannelRms = calibration.ChannelRms,
            Noise = calibration.Noise,
            Thresholds = [new KindThreshold(WaveKind.Planar, [enter], double.NaN, Surrogate: null, Baseline: null)],
        };
    }

    private void Note(string where, string what) =>
        _notes.Add(new Status(StatusLevel.Warning, where, what, "learn one from a baseline of this rig", double.NaN));
}
