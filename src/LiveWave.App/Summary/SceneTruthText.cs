using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.App;

/// <summary>Writes what was put into a synthetic recording: as a table, and as the texts of its marker stream.</summary>
internal static class SceneTruthText
{
    private const string Columns =
        "onset\tduration\ttrial_type\tdirection_degrees\tspeed_metres_per_second\twavelength_millimetres\twavelength_apertures\t"
        + "snr_decibels\tfrequency_hertz\tstrong\tin_sector\tpatch\tcentre_x_millimetres\tcentre_y_millimetres\tshape\tamplitude_microvolts\n";

    private static readonly JsonSerializerOptions OneLine = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>The table, a line an event; <c>in_sector</c> is a rule's matter and stays n/a.</summary>
    public static string Table(IReadOnlyList<SceneTruth> truths) => Columns + string.Concat(truths.Select(Row));

    /// <summary>A table of a patch's electrodes, mm.</summary>
    public static string Electrodes(ScenePatch patch) => "name\tx\ty\tz\n" + string.Concat(patch.Layout.Electrodes.Select(electrode =>
        string.Create(CultureInfo.InvariantCulture, $"{electrode.Channel}\t{electrode.XMm:0.######}\t{electrode.YMm:0.######}\t0\n")));

    /// <summary>One event as JSON on one line; null for what has no meaning.</summary>
    public static string Marker(SceneTruth truth) => new JsonObject
    {
        ["onsetSeconds"] = truth.OnsetSeconds,
        ["durationSeconds"] = truth.Event.DurationSeconds,
        ["patch"] = truth.Event.Patch,
        ["kind"] = WaveKinds.Word(truth.Event.Kind),
        ["shape"] = ShapeWord(truth),
        ["directionDegrees"] = Known(truth.DirectionDegrees),
        ["speedMetresPerSecond"] = Known(truth.SpeedMetresPerSecond),
        ["wavelengthMm"] = Known(truth.WavelengthMm),
        ["centreXMm"] = Known(truth.CentreXMm),
        ["centreYMm"] = Known(truth.CentreYMm),
        ["frequencyHz"] = truth.FrequencyHz,
        ["snrDecibels"] = Known(truth.SnrDecibels),
        ["amplitudeMicrovolts"] = truth.AmplitudeMicrovolts,
    }.ToJsonString(OneLine);

    private static string Row(SceneTruth truth)
    {
        var strong = truth.Event.Kind != WaveKind.Planar ? "n/a" : truth.IsStrong ? "yes" : "no";
        string[] cells =
        [
            Cell(truth.OnsetSeconds, "F3"), Cell(truth.Event.DurationSeconds, "F3"), WaveKinds.Word(truth.Event.Kind),
            Cell(truth.DirectionDegrees, "F1"), Cell(truth.SpeedMetresPerSecond, "F8"), Cell(truth.WavelengthMm, "F3"),
            Cell(truth.WavelengthApertures, "F4"), Cell(truth.SnrDecibels, "F1"), Cell(truth.FrequencyHz, "F2"), strong, "n/a",
            truth.Event.Patch, Cell(truth.CentreXMm, "F3"), Cell(truth.CentreYMm, "F3"), ShapeWord(truth) ?? "n/a", Cell(truth.AmplitudeMicrovolts, "F3"),
        ];
        return string.Join('\t', cells) + "\n";
    }

    private static string? ShapeWord(SceneTruth truth) => truth.Event.Kind != WaveKind.InPhase ? null : truth.Event.Shape switch
    {
        SceneShape.EdgeFocus => "edge focus",
        SceneShape.Ramp => "ramp",
        SceneShape.TwoPoles => "two poles",
        _ => "focus",
    };

    private static string Cell(double value, string format) => !double.IsFinite(value) ? "n/a" : value.ToString(format, CultureInfo.InvariantCulture);

    private static JsonValue? Known(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;
}
