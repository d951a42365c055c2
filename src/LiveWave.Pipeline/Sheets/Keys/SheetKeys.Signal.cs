using static LiveWave.Pipeline.KeyRows;

namespace LiveWave.Pipeline;

/// <content>The signal: patches, conditioning, bands with their estimators.</content>
public static partial class SheetKeys
{
    private static SheetKey[] PatchKeys() =>
    [
        Tables("patch", "One array of electrodes on the stream", required: true),
        Name("patch.name", "How the patch is called"),
        Texts("patch.channels", "Labels of its channels, in this order", otherwise: "all that the electrode table names"),
        new("patch.electrodes", SheetKeyType.Text, "Table of positions (BIDS electrodes.tsv), relative to the sheet") { IsRequired = true },
        Word("patch.unit", "Unit of the positions", ["mm", "cm", "m", "um"], usual: "mm"),
        Text("patch.seenFrom", "The view in which +x is right and +y is up", usual: "above"),
        Number(
            "patch.rotationDegrees", "degrees", "Counter-clockwise turn from the array's own frame to that view",
            usual: 0, low: -360, high: 360),
        Texts("patch.badChannels", "Labels of channels that must not be used"),
        Text("patch.calibration", "What baseline learnt, relative to the sheet", otherwise: "<sheet>.calibration.json beside it, if there"),
        new("patch.axes", SheetKeyType.NamedNumbers, "Names for directions, counter-clockwise from +x")
        {
            Unit = "degrees",
            Otherwise = "none",
            Low = -360,
            High = 360,
        },
        NotYet("patch.channelsFile", SheetKeyType.Text, "Table of channels (BIDS channels.tsv), for good, bad and unit"),
        NotYet("patch.positions", SheetKeyType.Text, "Positions out of the stream's own description, in place of a table"),
        NotYet("patch.timeSkewMicroseconds", SheetKeyType.Number, "From one channel's sample to the next one's", "microseconds"),
    ];

    private static SheetKey[] ConditioningKeys() =>
    [
        Table("conditioning", "What is done to rows before their phase is estimated"),
        new("conditioning.mainsHz", SheetKeyType.Number, "Mains hum that is taken out; 0: none")
        {
            Unit = "Hz",
            Words = ["0", "50", "60"],
            Default = 0.0,
        },
        Number(
            "conditioning.analysisRateHz", "Hz", "Rate to which rows are brought down after the notch; must divide the stream's rate",
            otherwise: "the stream's rate", low: 20, high: 20_000),
        Number(
            "conditioning.blankAfterPulseMs", "ms", "How long samples count as missing from a decision's due row on; 0: none",
            usual: 5, low: 0, high: 1000),
        NotYet("conditioning.reference", SheetKeyType.Text, "Re-reference: none, or the patch's mean"),
        NotYet("conditioning.artefactMicrovolts", SheetKeyType.Number, "Size at which a sample counts as missing", "microvolts"),
    ];

    private static SheetKey[] BandKeys() =>
    [
        Tables("band", "One frequency band", required: true),
        Name("band.name", "How the band is called"),
        Number("band.lowHz", "Hz", "Lower edge", low: 0, high: 100_000, above: true),
        Number("band.highHz", "Hz", "Upper edge, below half the rate", low: 0, high: 100_000, above: true),
        Table("band.phase", "How phase is estimated"),
        Word(
            "band.phase.estimator", "The phase estimator", ["oscillator", "bandpass-quadrature"], usual: "oscillator",
            notYet: ["auto", "oscillator-narrow", "trained-fir", "spectrum-fir", "demodulator", "end-corrected-hilbert", "ar-forward"]),
        Whole("band.phase.order", "Order of the band-pass filter, for bandpass-quadrature alone", usual: 2, high: 8),
    ];

    private static SheetKey[] WaveKeys() =>
    [
        Tables("band.wave", "One wave estimator of the band", required: true),
        Word(
            "band.wave.estimator", "The wave estimator", ["planar"],
            notYet: ["rotating", "expanding", "contracting", "front", "window"]),
        Number("band.wave.everyMs", "ms", "From reading to reading, at least one row", usual: 4, low: 0, high: 1000, above: true),
        Number(
            "band.wave.gainOverUniform", "", "Smallest logarithmic gain of the wave over a uniform field",
            usual: 6, low: 0.5, high: 50),
        Number(
            "band.wave.gainOutOfPhase", "", "Smallest logarithmic gain of its out-of-phase part over any field in phase",
            usual: 4, low: 0, high: 1000),
        Number(
            "band.wave.shortestWavelengthMm", "mm", "Shortest wavelength that is looked for",
            otherwise: "the larger of 2.5 pitches and half the aperture", low: 0, high: 1_000_000, above: true),
        Number(
            "band.wave.slowestWaveMetresPerSecond", "m/s", "Slowest wave of interest; a uniform field that excludes it is called synchronous",
            otherwise: "no frame is called synchronous", low: 0, high: 1000, above: true),
        NotYet("band.wave.either", SheetKeyType.Text, "The other estimator whose events are joined with this one's"),
    ];

    private static SheetKey[] EventKeys() =>
    [
        Table("band.wave.event", "When a wave is an event"),
        Number("band.wave.event.enter", "", "Evidence at which an event starts", otherwise: "the calibration's, else 5.0", low: -4),
        Number("band.wave.event.minimumMs", "ms", "How long a wave must last", usual: 60, low: 0, high: 10_000),
        Number("band.wave.event.stabilityMs", "ms", "Over how long its direction must be steady", usual: 60, low: 0, high: 10_000),
        Number(
            "band.wave.event.stabilityDegrees", "degrees", "Largest circular standard deviation of its direction in that time",
            usual: 25, low: 0, high: 180, above: true),
        Number("band.wave.event.gapMs", "ms", "Longest weak stretch that does not end it", usual: 20, low: 0, high: 10_000),
        Number("band.wave.event.refractoryMs", "ms", "After its end, how long no other event starts", usual: 100, low: 0, high: 60_000),
    ];
}
