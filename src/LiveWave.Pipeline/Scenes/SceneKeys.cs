using static LiveWave.Pipeline.KeyRows;

namespace LiveWave.Pipeline;

/// <summary>The key table of scenes: every table and key that a scene file may have.</summary>
public static class SceneKeys
{
    /// <summary>The rows, to look up.</summary>
    public static KeyTable Lookup { get; } = new(
        [.. SceneRows(), .. PatchRows(), .. BackgroundRows(), .. EventRows(), .. SeriesRows(), .. FaultRows()], "scene");

    private static SheetKey[] SceneRows() =>
    [
        Table("scene", "The recording itself", required: true),
        Name("scene.name", "How the scene is called"),
        Text("scene.notes", "Anything worth knowing later", usual: ""),
        Whole("scene.seed", "Keys every lot: same scene and seed, same file", usual: 1, low: 0),
        Number("scene.seconds", "s", "How long it lasts", low: 0, high: 86_400, above: true),
        Number("scene.rateHz", "Hz", "Samples per second", usual: 1000, low: 50, high: 50_000),
        Number("scene.firstStampSeconds", "s", "Stamp of the first sample", usual: 5000, low: 0, high: 1e9),
        Table("stream", "How it is written"),
        Text("stream.name", "Name of the stream of samples", usual: "scene array"),
        Word("stream.format", "Number format", ["int16", "float32"], usual: "int16"),
        Number("stream.microvoltsPerCount", "microvolts", "Size of one count of int16", usual: 0.05, low: 0, high: 1000, above: true),
        Table("band", "The band in which SNRs count", otherwise: "no event may have an SNR"),
        Number("band.lowHz", "Hz", "Lower edge", low: 0, high: 25_000, above: true),
        Number("band.highHz", "Hz", "Upper edge, below half the rate", low: 0, high: 25_000, above: true),
    ];

    private static SheetKey[] PatchRows() =>
    [
        Tables("patch", "One array of electrodes", required: true),
        Name("patch.name", "How the patch is called"),
        Text("patch.electrodes", "Table of positions (BIDS electrodes.tsv), relative to the scene", otherwise: "rows, columns and pitchMm"),
        Word("patch.unit", "Unit of that table's positions", ["mm", "cm", "m", "um"], usual: "mm"),
        Whole("patch.rows", "Rows of electrodes, counted from the bottom", otherwise: "electrodes", high: 256),
        Whole("patch.columns", "Columns of electrodes, counted from the left", otherwise: "electrodes", high: 256),
        Number("patch.pitchMm", "mm", "From electrode to electrode", otherwise: "electrodes", low: 0, high: 1000, above: true),
        Flag("patch.withoutCorners", "The four corners carry no electrode", usual: false),
        Text("patch.labelPrefix", "In front of the labels r1c1, r1c2, ...", otherwise: "nothing"),
        Table("rig", "What two recordings of one rig share"),
        Number("rig.gainLogSd", "", "Standard deviation of the logarithm of gains", usual: 0, low: 0, high: 2),
        Number("rig.offsetMicrovolts", "microvolts", "Standard deviation of electrode offsets", usual: 0, low: 0, high: 100_000),
        Whole("rig.seed", "Keys gains, offsets and the rhythm's field", otherwise: "scene.seed", low: 0),
    ];

    private static SheetKey[] BackgroundRows() =>
    [
        Table("background", "Activity without waves; standard deviations over the whole spectrum, before gains"),
        Number("background.localMicrovolts", "microvolts", "Local field, 1/f, correlated in space", usual: 0, low: 0, high: 100_000),
        Number(
            "background.localLengthMm", "mm", "Its correlation falls as exp(-distance / this)",
            otherwise: "half the aperture", low: 0, high: 10_000, above: true),
        Number("background.commonMicrovolts", "microvolts", "Common reference, 1/f, on all channels", usual: 0, low: 0, high: 100_000),
        Number("background.contactMicrovolts", "microvolts", "Contacts, 1/f, independent", usual: 0, low: 0, high: 100_000),
        Number("background.sensorMicrovolts", "microvolts", "Sensor noise, white, independent", usual: 0, low: 0, high: 100_000),
        Number("background.exponent", "", "Power falls as 1/f to this", usual: 1.2, low: 0.5, high: 1.8),
        Number("background.cornerHz", "Hz", "Flat below", usual: 0.5, low: 0.01, high: 100),
        Table("rhythm", "An ongoing rhythm that does not travel: one stochastic oscillator times a smooth field", otherwise: "none"),
        Number("rhythm.frequencyHz", "Hz", "Its centre", low: 0, high: 25_000, above: true),
        Number("rhythm.widthHz", "Hz", "Width of its line at half its height", low: 0, high: 1000, above: true),
        Number("rhythm.microvolts", "microvolts", "Standard deviation", low: 0, high: 100_000),
        Number("rhythm.fieldLogSd", "", "Standard deviation of the field's logarithm", usual: 0.15, low: 0, high: 2),
        Number(
            "rhythm.fieldLengthMm", "mm", "Length over which the field changes",
            otherwise: "0.6 of the aperture", low: 0, high: 10_000, above: true),
        Table("hum", "Mains hum, a sine in phase on all channels", otherwise: "none"),
        new("hum.mainsHz", SheetKeyType.Number, "Its frequency") { Unit = "Hz", Words = ["50", "60"], IsRequired = true },
        Number("hum.microvolts", "microvolts", "Its amplitude", low: 0, high: 100_000),
    ];

    private static SheetKey[] EventRows() =>
    [
        Tables("event", "An event, or a series of like ones"),
        Text("event.patch", "Name of the patch", otherwise: "the first"),
        Word(
            "event.kind", "What it is",
            ["planar", "rotating-counter-clockwise", "rotating-clockwise", "expanding", "contracting", "standing", "in phase", "synchronous"],
            notYet: ["front"]),
        Word(
            "event.mechanism", "What makes it: delays is one oscillator that drives sites with growing delays", ["delays"],
            usual: "delays", notYet: ["relay", "sheet"]),
        Number("event.onsetSeconds", "s", "Where its first flank begins", low: 0, high: 86_400),
        Number("event.durationSeconds", "s", "To the end of its other flank", low: 0, high: 86_400, above: true),
        Number("event.flankMs", "ms", "Length of its flanks", usual: 30, low: 0, high: 60_000),
        Number("event.frequencyHz", "Hz", "Its frequency", low: 0, high: 25_000, above: true),
        Number("event.phaseDegrees", "degrees", "Phase at the onset", otherwise: "by lot", low: -360, high: 360),
        Number("event.snrDecibels", "dB", "Its power against the background's in the band", otherwise: "amplitudeMicrovolts", low: -60, high: 120),
        Number(
            "event.amplitudeMicrovolts", "microvolts", "Its amplitude; of a shape the root mean square",
            otherwise: "snrDecibels", low: 0, high: 100_000, above: true),
        Number(
            "event.directionDegrees", "degrees", "Where it travels, across the nodes, or along the shape",
            otherwise: "needed by planar, standing, most shapes", low: -360, high: 360),
        Number("event.speedMetresPerSecond", "m/s", "Speed", otherwise: "wavelengthMm", low: 0, high: 1000, above: true),
        Number("event.wavelengthMm", "mm", "Wavelength", otherwise: "speedMetresPerSecond", low: 0, high: 1e6, above: true),
        Number("event.centreXMm", "mm", "Centre of what turns, spreads, shrinks, stands or has a shape", otherwise: "the patch's middle"),
        Number("event.centreYMm", "mm", "Its other coordinate", otherwise: "the patch's middle"),
        new("event.shape", SheetKeyType.Text, "Shape of a field in phase")
        {
            Words = ["focus", "edge focus", "ramp", "two poles"],
            Otherwise = "needed by in phase",
        },
    ];

    private static SheetKey[] SeriesRows() =>
    [
        Whole("event.repeats", "How many such events", usual: 1, high: 10_000),
        Number("event.everySeconds", "s", "From onset to onset", otherwise: "needed with repeats", low: 0, high: 86_400, above: true),
        Number("event.everySpreadSeconds", "s", "Onsets move by lot, up to this to either side", usual: 0, low: 0, high: 86_400),
        Number("event.directionSpreadDegrees", "degrees", "Directions differ by lot, up to this to either side; 180: any", usual: 0, low: 0, high: 180),
        Number("event.snrSpreadDecibels", "dB", "SNRs differ by lot, up to this to either side", usual: 0, low: 0, high: 60),
        Number("event.frequencySpreadHz", "Hz", "Frequencies differ by lot, up to this to either side", usual: 0, low: 0, high: 1000),
    ];

    private static SheetKey[] FaultRows() =>
    [
        Tables("fault", "What is wrong with the recording on purpose"),
        Word("fault.kind", "What it is", ["bad", "dying", "swapped", "gap", "saturation", "movement"]),
        Texts("fault.channels", "Labels of the channels", otherwise: "all; needed by bad, dying, swapped"),
        Number("fault.onsetSeconds", "s", "From when on", usual: 0, low: 0, high: 86_400),
        Number(
            "fault.durationSeconds", "s", "How long; dying: until it is dead", otherwise: "to the end; needed by dying, gap, movement",
            low: 0, high: 86_400, above: true),
        Number(
            "fault.microvolts", "microvolts", "Noise of a bad or dying channel, bound of saturation, size of a movement",
            otherwise: "needed by these", low: 0, high: 1e6, above: true),
    ];
}
