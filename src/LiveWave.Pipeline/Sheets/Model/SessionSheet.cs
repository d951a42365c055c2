namespace LiveWave.Pipeline;

/// <summary>One session sheet: everything that describes a run. Immutable; checked by <see cref="SheetForm"/>, so that names refer to
/// something and numbers are in range.</summary>
/// <remarks>Properties are named as the sheet's tables and keys are; numbers that the sheet leaves out and that have no default are
/// <see cref="double.NaN"/>.</remarks>
public sealed record SessionSheet
{
    /// <summary>The sheet's file, as it was asked for; paths in the sheet are relative to its folder.</summary>
    public required string File { get; init; }

    /// <summary>The run itself.</summary>
    public required SessionTable Session { get; init; }

    /// <summary>The stream of samples.</summary>
    public required StreamTable Stream { get; init; }

    /// <summary>What the amplifier does to the signal.</summary>
    public required AmplifierTable Amplifier { get; init; }

    /// <summary>What comes in from the task. Empty as long as cues are not built.</summary>
    public IReadOnlyList<CueTable> Cues { get; init; } = [];

    /// <summary>Arrays of electrodes, at least one.</summary>
    public required IReadOnlyList<PatchTable> Patches { get; init; }

    /// <summary>What is done to rows before their phase is estimated.</summary>
    public required ConditioningTable Conditioning { get; init; }

    /// <summary>Frequency bands, at least one.</summary>
    public required IReadOnlyList<BandTable> Bands { get; init; }

    /// <summary>The conditions under which the rig acts; without one a run only looks.</summary>
    public required IReadOnlyList<RuleTable> Rules { get; init; }

    /// <summary>Stretches of the session's plan. Empty as long as parts are not built.</summary>
    public IReadOnlyList<PartTable> Parts { get; init; } = [];

    /// <summary>The pulse gate's limits; null where the sheet has none, and then a run can't be armed.</summary>
    public required LimitsTable? Limits { get; init; }

    /// <summary>Where pulses go.</summary>
    public required IReadOnlyList<OutputTable> Outputs { get; init; }

    /// <summary>How long computing may take.</summary>
    public required BudgetTable Budget { get; init; }

    /// <summary>What is recorded.</summary>
    public required RecordTable Record { get; init; }

    /// <summary>The calibration that belongs to this sheet where a patch names none: beside the sheet, and called like it
    /// (<c>millrace.calibration.json</c> for <c>millrace.sheet.toml</c>). The file may not exist yet: <c>baseline</c> writes it.</summary>
    public string CalibrationBeside
    {
        get
        {
            var name = Path.GetFileName(File);
            foreach (var ending in (ReadOnlySpan<string>)[".sheet.toml", ".toml"])
            {
                if (name.EndsWith(ending, StringComparison.OrdinalIgnoreCase)) return name[..^ending.Length] + ".calibration.json";
            }

            return name + ".calibration.json";
        }
    }

    /// <summary>The place of a file that the sheet names.</summary>
    /// <param name="path">As the sheet gives it: relative to the sheet's folder, or absolute.</param>
    public string PathOf(string path) => Path.Combine(Path.GetDirectoryName(File) ?? "", path);
}
