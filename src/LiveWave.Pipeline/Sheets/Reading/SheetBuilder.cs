using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Makes the model from a sheet without faults.</summary>
internal sealed class SheetBuilder(string file)
{
    /// <summary>Makes it.</summary>
    /// <param name="sheet">Checked, with nothing refused.</param>
    public SessionSheet Build(CheckedTable sheet)
    {
        var bands = sheet.Tables("band").Select(Band).ToArray();
        return new()
        {
            File = file,
            Session = Session(Needed(sheet, "session")),
            Stream = Stream(Needed(sheet, "stream")),
            Amplifier = Amplifier(Needed(sheet, "amplifier")),
            Patches = [.. sheet.Tables("patch").Select(Patch)],
            Conditioning = Conditioning(Needed(sheet, "conditioning")),
            Bands = bands,
            Rules = [.. sheet.Tables("rule").Select(rule => Rule(rule, bands))],
            Limits = sheet.Table("limits") is { } limits ? Limits(limits) : null,
            Outputs = [.. sheet.Tables("output").Select(Output)],
            Budget = Budget(Needed(sheet, "budget")),
            Record = new() { Folder = Said(Needed(sheet, "record"), "folder") },
        };
    }

    private static SessionTable Session(CheckedTable table) => new()
    {
        Name = Said(table, "name"),
        Notes = Said(table, "notes"),
        Seed = (ulong)(table.Whole("seed") ?? 0),
    };

    private static StreamTable Stream(CheckedTable table) => new()
    {
        File = table.Text("file"),
        Name = table.Text("name"),
        RateHz = table.Number("rateHz"),
        Channels = (int?)table.Whole("channels"),
    };

    private static AmplifierTable Amplifier(CheckedTable table) => new()
    {
        AcquisitionDelayMs = table.Number("acquisitionDelayMs"),
        AcquisitionDelayFrom = Said(table, "acquisitionDelayFrom"),
    };

    private static PatchTable Patch(CheckedTable table) => new()
    {
        Name = Said(table, "name"),
        Channels = table.Texts("channels"),
        Electrodes = Said(table, "electrodes"),
        Unit = Said(table, "unit"),
        SeenFrom = Said(table, "seenFrom"),
        RotationDegrees = table.Number("rotationDegrees"),
        BadChannels = table.Texts("badChannels"),
        Calibration = table.Text("calibration"),
        Axes = [.. table.Entries("axes").Select(axis => new NamedAxis(axis.Key, (double)axis.Value))],
    };

    private static ConditioningTable Conditioning(CheckedTable table) => new()
    {
        MainsHz = table.Number("mainsHz"),
        AnalysisRateHz = table.Number("analysisRateHz"),
        BlankAfterPulseMs = table.Number("blankAfterPulseMs"),
    };

    private static BandTable Band(CheckedTable table)
    {
        var phase = Needed(table, "phase");
        return new()
        {
            Name = Said(table, "name"),
            LowHz = table.Number("lowHz"),
            HighHz = table.Number("highHz"),
            Phase = new() { Estimator = Said(phase, "estimator"), Order = Count(phase, "order") },
            Waves = [.. table.Tables("wave").Select(Wave)],
        };
    }

    private static WaveTable Wave(CheckedTable table) => new()
    {
        Estimator = Said(table, "estimator"),
        EveryMs = table.Number("everyMs"),
        GainOverUniform = table.Number("gainOverUniform"),
        GainOutOfPhase = table.Number("gainOutOfPhase"),
        ShortestWavelengthMm = table.Number("shortestWavelengthMm"),
        SlowestWaveMetresPerSecond = table.Number("slowestWaveMetresPerSecond"),
        Event = Event(Needed(table, "event")),
    };

    private static EventTable Event(CheckedTable table) => new()
    {
        Enter = table.Number("enter"),
        MinimumMs = table.Number("minimumMs"),
        StabilityMs = table.Number("stabilityMs"),
        StabilityDegrees = table.Number("stabilityDegrees"),
        GapMs = table.Number("gapMs"),
        RefractoryMs = table.Number("refractoryMs"),
    };

    private static RuleTable Rule(CheckedTable table, BandTable[] bands) => new()
    {
        Name = Said(table, "name"),
        Patch = Said(table, "patch"),
        Band = Said(table, "band"),
        Wave = table.Text("wave") ?? bands.First(band => band.Name == table.Text("band")).Waves[0].Estimator,
        Kind = WaveKinds.TryParse(Said(table, "kind"), out var kind) ? kind : throw Hole(table, "kind"),
        DirectionDegrees = table.Number("directionDegrees"),
        ToleranceDegrees = table.Number("toleranceDegrees"),
        StandardErrorDegrees = table.Number("standardErrorDegrees"),
        Evidence = table.Number("evidence"),
        LeadMs = table.Number("leadMs"),
        RestMs = table.Number("restMs"),
        ShamFraction = table.Number("shamFraction"),
        Code = Count(table, "code"),
        Outputs = table.Texts("outputs"),
    };

    private static LimitsTable Limits(CheckedTable table) => new()
    {
        PulsesPerMinute = Count(table, "pulsesPerMinute"),
        PulsesPerSession = Count(table, "pulsesPerSession"),
        ShortestIntervalMs = table.Number("shortestIntervalMs"),
        LongestRunMinutes = table.Number("longestRunMinutes"),
        OldestDataMs = table.Number("oldestDataMs"),
    };

    private OutputTable Output(CheckedTable table) => new()
    {
        Name = Said(table, "name"),
        Plugin = Said(table, "plugin"),
        Options = table.Entries("options"),
        PatienceMs = table.Number("patienceMs"),
        Dummy = table.Flag("dummy"),
        Where = $"{file}:{table.LineOf("options")}: {table.Path}.options",
    };

    private static BudgetTable Budget(CheckedTable table) => new()
    {
        PhasedMs = table.Number("phasedMs"),
        ReadMs = table.Number("readMs"),
        DecidedMs = table.Number("decidedMs"),
        InAllMs = table.Number("inAllMs"),
    };

    private static string Said(CheckedTable table, string name) => table.Text(name) ?? throw Hole(table, name);

    private static int Count(CheckedTable table, string name) => (int)(table.Whole(name) ?? throw Hole(table, name));

    private static CheckedTable Needed(CheckedTable table, string name) => table.Table(name) ?? throw Hole(table, name);

    private static InvalidOperationException Hole(CheckedTable table, string name) =>
        new($"'{SheetKeys.Join(table.Path, name)}' was neither read nor refused");
}
