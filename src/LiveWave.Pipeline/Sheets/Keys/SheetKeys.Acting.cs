using static LiveWave.Pipeline.KeyRows;

namespace LiveWave.Pipeline;

/// <content>Acting: rules, limits, outputs.</content>
public static partial class SheetKeys
{
    private static SheetKey[] RuleKeys() =>
    [
        Tables("rule", "A condition under which the rig acts"),
        Name("rule.name", "How the rule is called"),
        Reference("rule.patch", "Name of the patch that it watches"),
        Reference("rule.band", "Name of the band that it watches"),
        Text("rule.wave", "Which of the band's wave estimators counts", otherwise: "the band's first"),
        Word(
            "rule.kind", "The kind of wave", ["planar"],
            notYet: ["rotating-counter-clockwise", "rotating-clockwise", "expanding", "contracting", "front"]),
        Number(
            "rule.directionDegrees", "degrees", "Middle of the sector: the way the wave travels, counter-clockwise from +x",
            otherwise: "any direction", low: -360, high: 360),
        Number(
            "rule.toleranceDegrees", "degrees", "Half the sector's width; goes with directionDegrees",
            otherwise: "any direction", low: 0, high: 180, above: true),
        Number(
            "rule.standardErrorDegrees", "degrees", "Largest standard error of the direction",
            usual: 20, low: 0, high: 180, above: true),
        Number("rule.evidence", "", "Smallest evidence", otherwise: "the event's is enough"),
        Number("rule.leadMs", "ms", "From the deciding row's stamp to the pulse", usual: 20, low: 0, high: 10_000),
        Number("rule.restMs", "ms", "After a pulse or sham of this rule, how long it holds", usual: 1000, low: 0, high: 3_600_000),
        Number("rule.shamFraction", "", "Share of matches for which by lot no pulse is sent", usual: 0, low: 0, high: 1),
        Whole("rule.code", "The pulse's code", usual: 1, high: 65_535),
        Texts("rule.outputs", "Names of the outputs that its pulses go to", otherwise: "none: it only decides"),
        NotYet(
            "rule.permit", SheetKeyType.Options,
            "What must hold besides the wave, as { after = \"stimulus-on\", fromMs = 200, toMs = 700 }"),
        NotYet("rule.phaseDegrees", SheetKeyType.Number, "Phase at a site at which the pulse must land", "degrees"),
        NotYet("rule.phaseToleranceDegrees", SheetKeyType.Number, "Half the width of the phase allowed", "degrees"),
        NotYet("rule.phaseSite", SheetKeyType.Text, "The channel whose phase is meant"),
        NotYet("rule.slowestMetresPerSecond", SheetKeyType.Number, "Lower end of the speed range", "m/s"),
        NotYet("rule.fastestMetresPerSecond", SheetKeyType.Number, "Upper end of the speed range", "m/s"),
        NotYet("rule.aim", SheetKeyType.Text, "Whether a target is sought from rows or from block borders"),
    ];

    private static SheetKey[] LimitsKeys() =>
    [
        Table("limits", "What the pulse gate never lets pass", otherwise: "none, and the run can't be armed"),
        Whole("limits.pulsesPerMinute", "Most pulses in any minute", high: 60_000),
        Whole("limits.pulsesPerSession", "Most pulses in the session", high: 1_000_000),
        Number("limits.shortestIntervalMs", "ms", "Shortest time between two pulses", low: 0, high: 3_600_000, above: true),
        Number("limits.longestRunMinutes", "minutes", "Longest run", low: 0, high: 1440, above: true),
        Number(
            "limits.oldestDataMs", "ms", "Oldest that a deciding row may be when its pulse leaves; above every leadMs",
            low: 0, high: 20_000, above: true),
    ];

    private static SheetKey[] OutputKeys() =>
    [
        Tables("output", "Where pulses go"),
        Name("output.name", "How the output is called"),
        Word("output.plugin", "Its kind: none sends nothing, memory keeps the pulses in memory", ["none", "memory"]),
        new("output.options", SheetKeyType.Options, "The plug-in's own keys") { Otherwise = "none" },
        Number(
            "output.patienceMs", "ms", "How long a send may take before the output counts as faulty",
            usual: 100, low: 0, high: 60_000, above: true),
        Flag("output.dummy", "The stimulator is off or on a load: rehearsals may drive it", usual: false),
    ];
}
