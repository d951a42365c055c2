using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>What no single key of a scene can tell: names, edges and rates, what each kind of event and fault needs. What was refused
/// already is passed over.</summary>
internal sealed class SceneCrossChecks(List<SheetFault> faults)
{
    private const int MostChannels = 1024;

    private static readonly Dictionary<string, EventNeeds> ByKind = new(StringComparer.Ordinal)
    {
        ["planar"] = new(["directionDegrees"], HasSpeed: true, HasWavelength: true, HasCentre: false),
        ["expanding"] = new([], HasSpeed: true, HasWavelength: true, HasCentre: true),
        ["contracting"] = new([], HasSpeed: true, HasWavelength: true, HasCentre: true),
        ["rotating-counter-clockwise"] = new([], HasSpeed: false, HasWavelength: false, HasCentre: true),
        ["rotating-clockwise"] = new([], HasSpeed: false, HasWavelength: false, HasCentre: true),
        ["standing"] = new(["directionDegrees"], HasSpeed: false, HasWavelength: true, HasCentre: true),
        ["in phase"] = new(["shape"], HasSpeed: false, HasWavelength: false, HasCentre: true),
        ["synchronous"] = new([], HasSpeed: false, HasWavelength: false, HasCentre: false),
    };

    private static readonly Dictionary<string, string[]> FaultNeeds = new(StringComparer.Ordinal)
    {
        ["bad"] = ["channels", "microvolts"],
        ["dying"] = ["channels", "durationSeconds", "microvolts"],
        ["swapped"] = ["channels"],
        ["gap"] = ["durationSeconds"],
        ["saturation"] = ["microvolts"],
        ["movement"] = ["durationSeconds", "microvolts"],
    };

    /// <summary>Labels of channels, once the electrodes are known.</summary>
    public static SheetFault? Channels(Scene scene, CheckedTable file)
    {
        var labels = scene.Patches.SelectMany(patch => patch.Layout.Electrodes).Select(electrode => electrode.Channel).ToList();
        if (labels.Count > MostChannels)
        {
            return new(file.Tables("patch")[0].Line, "patch", $"the scene has {labels.Count} channels", $"give at most {MostChannels}");
        }

        if (labels.GroupBy(label => label, StringComparer.Ordinal).FirstOrDefault(group => group.Count() > 1) is { } twice)
        {
            return new(
                file.Tables("patch")[^1].Line, "patch.labelPrefix", $"two channels are called {SheetValues.Quoted(twice.Key)}",
                "give each patch a labelPrefix of its own");
        }

        foreach (var fault in file.Tables("fault"))
        {
            if (fault.Texts("channels").FirstOrDefault(label => !labels.Contains(label)) is not { } stranger) continue;
            return new(
                fault.LineOf("channels"), "fault.channels", $"there is no channel {SheetValues.Quoted(stranger)}",
                Spelling.Hint(stranger, labels) + $"the scene has '{labels[0]}' to '{labels[^1]}'");
        }

        return null;
    }

    /// <summary>Checks a whole scene.</summary>
    public void Check(CheckedTable file)
    {
        var scene = file.Table("scene");
        var (seconds, rateHz) = (scene?.Number("seconds") ?? double.NaN, scene?.Number("rateHz") ?? double.NaN);
        if (file.Table("band") is { } band) CheckBand(band, rateHz);
        if (file.Table("rhythm") is { } rhythm) RefuseAbove(rhythm, "frequencyHz", rateHz);
        if (file.Table("background")?.Number("cornerHz") >= 0.25 * rateHz)
        {
            Fault(file.Table("background")!, "cornerHz", "it is not below a quarter of the rate", "lower it");
        }

        var patches = file.Tables("patch").Select(patch => patch.Text("name")).OfType<string>().ToArray();
        foreach (var patch in file.Tables("patch")) CheckPatch(patch, patches);
        foreach (var wave in file.Tables("event"))
        {
            CheckEvent(wave, patches);
            RefuseAbove(wave, "frequencyHz", rateHz);
            if (wave.Number("frequencySpreadHz") >= wave.Number("frequencyHz"))
            {
                Fault(wave, "frequencySpreadHz", "it reaches 0 Hz", "lower it");
            }

            CheckAmplitude(wave, hasBand: file.Wrote("band"));
            CheckTimes(wave, seconds);
        }

        foreach (var fault in file.Tables("fault")) CheckFault(fault);
    }

    private void CheckBand(CheckedTable band, double rateHz)
    {
        if (band.Number("lowHz") >= band.Number("highHz")) Fault(band, "highHz", "it is not above lowHz", "correct one of the two");
        RefuseAbove(band, "highHz", rateHz);
    }

    private void CheckPatch(CheckedTable patch, string[] names)
    {
        if (patch.Text("name") is { } name && names.Count(other => other == name) > 1)
        {
            Fault(patch, "name", $"{SheetValues.Quoted(name)} is taken by another patch", "give each its own");
        }

        if (patch.Flag("withoutCorners") && patch.Whole("rows") <= 2 && patch.Whole("columns") <= 2)
        {
            Fault(patch, "withoutCorners", "nothing is left without corners", "leave it out, or give more rows or columns");
        }

        foreach (var key in (string[])["rows", "columns", "pitchMm"])
        {
            if (patch.Wrote("electrodes") && patch.Wrote(key)) Fault(patch, key, "the patch has a table of electrodes", "leave one of the two out");
            if (patch.Wrote("electrodes") || patch.Wrote(key)) continue;
            Fault(patch, key, "missing", "give rows, columns and pitchMm, or electrodes");
            return;
        }
    }

    private void CheckEvent(CheckedTable wave, string[] patches)
    {
        if (wave.Text("patch") is { } patch && !patches.Contains(patch, StringComparer.Ordinal))
        {
            Fault(wave, "patch", $"there is no {SheetValues.Quoted(patch)}", Spelling.Hint(patch, patches) + "allowed: " + string.Join(", ", patches));
        }

        if (wave.Text("kind") is not { } kind || !ByKind.TryGetValue(kind, out var needs)) return;
        foreach (var key in needs.Keys) Need(wave, kind, key);
        if (kind == "in phase" && wave.Text("shape") is "edge focus" or "ramp" or "two poles") Need(wave, $"shape '{wave.Text("shape")}'", "directionDegrees");
        if (kind != "in phase") RefuseUseless(wave, kind, "shape");
        if (!needs.HasSpeed) RefuseUseless(wave, kind, "speedMetresPerSecond");
        if (!needs.HasWavelength) RefuseUseless(wave, kind, "wavelengthMm");
        if (!needs.HasCentre) RefuseUseless(wave, kind, "centreXMm");
        if (!needs.HasCentre) RefuseUseless(wave, kind, "centreYMm");
        if (needs.HasSpeed) OneOf(wave, "speedMetresPerSecond", "wavelengthMm");
        else if (needs.HasWavelength) Need(wave, kind, "wavelengthMm");
        if (wave.Whole("repeats") > 1) Need(wave, "a series", "everySeconds");
    }

    private void CheckAmplitude(CheckedTable wave, bool hasBand)
    {
        OneOf(wave, "snrDecibels", "amplitudeMicrovolts");
        if (wave.Wrote("snrDecibels") && !hasBand)
        {
            Fault(wave, "snrDecibels", "the scene has no [band] in which it would count", "give a [band], or amplitudeMicrovolts");
        }
    }

    private void CheckTimes(CheckedTable wave, double seconds)
    {
        var every = wave.Whole("repeats") > 1 ? (wave.Whole("repeats") - 1) * wave.Number("everySeconds") : 0;
        var end = wave.Number("onsetSeconds") + every + wave.Number("durationSeconds");
        if (end > seconds) Fault(wave, "onsetSeconds", $"it would end at {SheetValues.Written(end ?? 0)} s, after the scene's end", "make the scene longer, or the event earlier");
        if (2 * wave.Number("flankMs") > 1000 * wave.Number("durationSeconds"))
        {
            Fault(wave, "flankMs", "two flanks are longer than the event", "shorten them");
        }
    }

    private void CheckFault(CheckedTable fault)
    {
        if (fault.Text("kind") is not { } kind || !FaultNeeds.TryGetValue(kind, out var needs)) return;
        foreach (var key in needs) Need(fault, kind, key);
        if (kind == "swapped" && fault.Texts("channels").Count is not (0 or 2)) Fault(fault, "channels", "two channels are swapped", "name two");
    }

    private void RefuseAbove(CheckedTable table, string key, double rateHz)
    {
        if (table.Number(key) >= 0.5 * rateHz) Fault(table, key, "it is not below half the rate", $"give a number below {SheetValues.Written(0.5 * rateHz)} (Hz)");
    }

    private void OneOf(CheckedTable table, string one, string other)
    {
        if (table.Wrote(one) != table.Wrote(other)) return;
        Fault(table, one, table.Wrote(one) ? $"{other} is there too" : "missing", $"give {one} or {other}");
    }

    private void Need(CheckedTable table, string what, string key)
    {
        if (!table.Wrote(key)) Fault(table, key, "missing", $"{what} needs it");
    }

    private void RefuseUseless(CheckedTable table, string kind, string key)
    {
        if (table.Wrote(key)) Fault(table, key, $"it has no meaning for {kind}", "leave it out");
    }

    private void Fault(CheckedTable table, string key, string what, string advice) =>
        faults.Add(new(table.LineOf(key), KeyTable.Join(table.Path, key), what, advice));

    /// <summary>What an event of a kind needs and may have.</summary>
    private sealed record EventNeeds(string[] Keys, bool HasSpeed, bool HasWavelength, bool HasCentre);
}
