using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>Makes the model from a scene without faults.</summary>
internal sealed class SceneBuilder(Func<string, string, IReadOnlyList<Electrode>> electrodes)
{
    public Scene Build(CheckedTable file)
    {
        var (scene, stream, band) = (Needed(file, "scene"), Needed(file, "stream"), file.Table("band"));
        var patches = file.Tables("patch").Select(Patch).ToArray();
        var hum = file.Table("hum");
        return new()
        {
            Name = Said(scene, "name"),
            Seed = (ulong)(scene.Whole("seed") ?? 0),
            Seconds = scene.Number("seconds"),
            RateHz = scene.Number("rateHz"),
            FirstStampSeconds = scene.Number("firstStampSeconds"),
            StreamName = Said(stream, "name"),
            Wire = Said(stream, "format") == "int16" ? WireFormat.Int16 : WireFormat.Float32,
            MicrovoltsPerCount = stream.Number("microvoltsPerCount"),
            BandLowHz = band?.Number("lowHz") ?? double.NaN,
            BandHighHz = band?.Number("highHz") ?? double.NaN,
            Patches = patches,
            Background = Background(Needed(file, "background")),
            Rhythm = file.Table("rhythm") is { } rhythm ? Rhythm(rhythm) : null,
            MainsHz = hum?.Number("mainsHz") ?? 50,
            HumMicrovolts = hum?.Number("microvolts") ?? 0,
            Rig = Rig(Needed(file, "rig")),
            Events = [.. file.Tables("event").Select(table => Event(table, patches[0].Name))],
            Faults = [.. file.Tables("fault").Select(Fault)],
        };
    }

    private static SceneBackground Background(CheckedTable table) => new()
    {
        LocalMicrovolts = table.Number("localMicrovolts"),
        LocalLengthMm = table.Number("localLengthMm"),
        CommonMicrovolts = table.Number("commonMicrovolts"),
        ContactMicrovolts = table.Number("contactMicrovolts"),
        SensorMicrovolts = table.Number("sensorMicrovolts"),
        Exponent = table.Number("exponent"),
        CornerHz = table.Number("cornerHz"),
    };

    private static SceneRhythm Rhythm(CheckedTable table) => new(
        table.Number("frequencyHz"), table.Number("widthHz"), table.Number("microvolts"), table.Number("fieldLogSd"), table.Number("fieldLengthMm"));

    private static SceneRig Rig(CheckedTable table) =>
        new(table.Number("gainLogSd"), table.Number("offsetMicrovolts"), (ulong?)table.Whole("seed"));

    private static SceneEvent Event(CheckedTable table, string firstPatch) => new()
    {
        Patch = table.Text("patch") ?? firstPatch,
        Kind = WaveKinds.TryParse(Said(table, "kind"), out var kind) ? kind : throw Hole(table, "kind"),
        OnsetSeconds = table.Number("onsetSeconds"),
        DurationSeconds = table.Number("durationSeconds"),
        FlankMs = table.Number("flankMs"),
        FrequencyHz = table.Number("frequencyHz"),
        PhaseDegrees = table.Number("phaseDegrees"),
        SnrDecibels = table.Number("snrDecibels"),
        AmplitudeMicrovolts = table.Number("amplitudeMicrovolts"),
        DirectionDegrees = table.Number("directionDegrees"),
        SpeedMetresPerSecond = table.Number("speedMetresPerSecond"),
        WavelengthMm = table.Number("wavelengthMm"),
        CentreXMm = table.Number("centreXMm"),
        CentreYMm = table.Number("centreYMm"),
        Shape = table.Text("shape") switch
        {
            "edge focus" => SceneShape.EdgeFocus,
            "ramp" => SceneShape.Ramp,
            "two poles" => SceneShape.TwoPoles,
            _ => SceneShape.Focus,
        },
        Repeats = (int)(table.Whole("repeats") ?? throw Hole(table, "repeats")),
        EverySeconds = table.Number("everySeconds"),
        EverySpreadSeconds = table.Number("everySpreadSeconds"),
        DirectionSpreadDegrees = table.Number("directionSpreadDegrees"),
        SnrSpreadDecibels = table.Number("snrSpreadDecibels"),
        FrequencySpreadHz = table.Number("frequencySpreadHz"),
    };

    private static SceneFault Fault(CheckedTable table) => new()
    {
        Kind = Said(table, "kind") switch
        {
            "bad" => SceneFaultKind.Bad,
            "dying" => SceneFaultKind.Dying,
            "swapped" => SceneFaultKind.Swapped,
            "gap" => SceneFaultKind.Gap,
            "saturation" => SceneFaultKind.Saturation,
            _ => SceneFaultKind.Movement,
        },
        Channels = table.Texts("channels"),
        OnsetSeconds = table.Number("onsetSeconds"),
        DurationSeconds = table.Wrote("durationSeconds") ? table.Number("durationSeconds") : double.PositiveInfinity,
        Microvolts = table.Number("microvolts"),
    };

    private ScenePatch Patch(CheckedTable table)
    {
        var name = Said(table, "name");
        if (table.Text("electrodes") is { } path) return new ScenePatch(name, new Layout(electrodes(path, Said(table, "unit"))));
        return ScenePatch.Grid(
            name, (int)(table.Whole("rows") ?? throw Hole(table, "rows")), (int)(table.Whole("columns") ?? throw Hole(table, "columns")),
            table.Number("pitchMm"), table.Flag("withoutCorners"), table.Text("labelPrefix") ?? "");
    }

    private static string Said(CheckedTable table, string name) => table.Text(name) ?? throw Hole(table, name);

    private static CheckedTable Needed(CheckedTable table, string name) => table.Table(name) ?? throw Hole(table, name);

    private static InvalidOperationException Hole(CheckedTable table, string name) =>
        new($"'{KeyTable.Join(table.Path, name)}' was neither read nor refused");
}
