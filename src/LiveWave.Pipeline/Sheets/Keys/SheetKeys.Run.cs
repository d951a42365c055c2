using static LiveWave.Pipeline.KeyRows;

namespace LiveWave.Pipeline;

/// <content>The run: session, stream, amplifier, cues, parts, budget, record.</content>
public static partial class SheetKeys
{
    private static SheetKey[] SessionKeys() =>
    [
        Table("session", "The run itself", required: true),
        Name("session.name", "How the session is called; a part of the phrase that arms it"),
        Text("session.notes", "Anything worth knowing later, without identities", usual: ""),
        Whole("session.seed", "Keys the lots that choose between pulse and sham", usual: 1, low: 0),
        NotYet("session.quietMemory", SheetKeyType.Flag, "Holds garbage collections off while the run is not armed, too"),
    ];

    private static SheetKey[] StreamKeys() =>
    [
        Table("stream", "The stream of samples, from a file or live", required: true),
        Text("stream.file", "The recording, relative to the sheet", otherwise: "needed, until there is a query"),
        Text("stream.name", "The stream's name in the recording", otherwise: "its only stream of samples"),
        Number("stream.rateHz", "Hz", "Rate that the stream must have", otherwise: "as it says", low: 0, high: 200_000, above: true),
        Whole("stream.channels", "Number of channels that the stream must have", otherwise: "as it says", high: 65_536),
        NotYet("stream.query", SheetKeyType.Text, "Which live stream: a query in LSL's words"),
        NotYet("stream.unit", SheetKeyType.Text, "Unit of the samples where the stream states none"),
    ];

    private static SheetKey[] AmplifierKeys() =>
    [
        Table("amplifier", "What happens between the electrode and a sample's stamp"),
        Number(
            "amplifier.acquisitionDelayMs", "ms", "From the electrode to the sample's stamp",
            usual: 0, low: 0, high: 1000),
        Text("amplifier.acquisitionDelayFrom", "Where that figure comes from: data sheet, measured by whom and how", usual: ""),
        NotYet("amplifier.highPassHz", SheetKeyType.Number, "Corner of its high-pass filter", "Hz"),
        NotYet("amplifier.highPassOrder", SheetKeyType.Whole, "Order of that filter"),
        NotYet("amplifier.lowPassHz", SheetKeyType.Number, "Corner of its low-pass filter", "Hz"),
        NotYet("amplifier.lowPassOrder", SheetKeyType.Whole, "Order of that filter"),
        NotYet("amplifier.polarity", SheetKeyType.Text, "Whether negative is shown up"),
        NotYet("amplifier.counterChannel", SheetKeyType.Text, "The channel in which it counts its samples, for finding losses"),
    ];

    private static SheetKey[] CueKeys() =>
    [
        NotYet("cue", SheetKeyType.Tables, "A marker or data line from the task: recorded, used as echo, or opening and closing a rule"),
        NotYet("cue.name", SheetKeyType.Name, "How the cue is called"),
        NotYet("cue.marker", SheetKeyType.Text, "The marker's text"),
        NotYet("cue.channel", SheetKeyType.Text, "The data channel that holds the line"),
        NotYet("cue.use", SheetKeyType.Text, "What it is for: record, echo or rule"),
    ];

    private static SheetKey[] PartKeys() =>
    [
        NotYet("part", SheetKeyType.Tables, "A stretch of the session's plan: baseline, stimulation, wash-out"),
        NotYet("part.name", SheetKeyType.Name, "How the part is called"),
        NotYet("part.lengthMinutes", SheetKeyType.Number, "How long it takes", "minutes"),
    ];

    private static SheetKey[] BudgetKeys() =>
    [
        Table("budget", "Longest computing time, stage by stage"),
        Number("budget.phasedMs", "ms", "For conditioning and phase", usual: 0.3, low: 0, high: 1000, above: true),
        Number("budget.readMs", "ms", "For the wave estimators", usual: 0.6, low: 0, high: 1000, above: true),
        Number("budget.decidedMs", "ms", "For events, rules and the decision", usual: 1, low: 0, high: 1000, above: true),
        Number("budget.inAllMs", "ms", "From received to decided", usual: 1, low: 0, high: 1000, above: true),
    ];

    private static SheetKey[] RecordKeys() =>
    [
        Table("record", "What is recorded"),
        Text("record.folder", "The folder that session folders are made in, relative to where the program is called", usual: "sessions"),
        NotYet("record.keep", SheetKeyType.Texts, "What to keep of raw samples, readings, events"),
    ];
}
