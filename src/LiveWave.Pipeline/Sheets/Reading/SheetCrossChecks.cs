using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>What no single key can tell: names that refer to one another, edges and rates, limits that contradict each other. Values that
/// were refused already are passed over, so that one slip is one line.</summary>
internal sealed class SheetCrossChecks(List<SheetFault> faults)
{
    /// <summary>Checks a whole sheet.</summary>
    public void Check(CheckedTable sheet)
    {
        foreach (var list in (ReadOnlySpan<string>)["patch", "band", "rule", "output"])
        {
            RefuseTwice(sheet.Tables(list), "name");
        }

        if (sheet.Table("stream") is { } stream) CheckStream(stream);
        var rateHz = sheet.Table("stream")?.Number("rateHz") ?? double.NaN;
        var channels = sheet.Table("stream")?.Whole("channels");
        foreach (var patch in sheet.Tables("patch")) CheckPatch(patch, channels);
        var analysisRateHz = sheet.Table("conditioning") is { } conditioning ? CheckConditioning(conditioning, rateHz) : double.NaN;
        foreach (var band in sheet.Tables("band")) CheckBand(band, rateHz, analysisRateHz);
        foreach (var rule in sheet.Tables("rule")) CheckRule(rule, sheet);
        if (sheet.Table("limits") is { } limits) CheckLimits(limits);
    }

    private void CheckStream(CheckedTable stream)
    {
        if (stream.Wrote("file") || stream.Wrote("query")) return;
        Fault(stream, "file", "the stream has neither a file nor a query", "give file = \"recording.xdf\"; a query is not yet built");
    }

    /// <returns>The analysis rate; NaN where rows stay as they come, or where it was refused.</returns>
    private double CheckConditioning(CheckedTable conditioning, double rateHz)
    {
        if (conditioning.Number("mainsHz") >= 0.5 * rateHz)
        {
            Fault(conditioning, "mainsHz", "it is not below half the stream's rate", "give 0: such a rate can't hold mains hum");
        }

        var analysisRateHz = conditioning.Number("analysisRateHz");
        if (double.IsNaN(rateHz) || double.IsNaN(analysisRateHz) || Decimator.Refusal(rateHz, analysisRateHz) is not { } refusal) return analysisRateHz;
        Fault(conditioning, "analysisRateHz", refusal.What, refusal.Advice);
        return double.NaN;
    }

    private void CheckPatch(CheckedTable patch, long? streamChannels)
    {
        var channels = patch.Texts("channels");
        if (patch.Wrote("channels") && patch.Texts("channels").Count == 0)
        {
            // An empty list would otherwise read as 'all'.
            FaultUnlessKnown(patch, "channels", "it is empty", "name the channels, or leave it out for all of the electrode table");
        }

        if (channels.Count > streamChannels)
        {
            Fault(
                patch, "channels", $"it names {channels.Count} channels and the stream has {streamChannels}",
                "name fewer, or correct stream.channels");
        }

        foreach (var bad in patch.Texts("badChannels"))
        {
            if (channels.Count == 0 || channels.Contains(bad, StringComparer.Ordinal)) continue;
            Fault(
                patch, "badChannels", $"{SheetValues.Quoted(bad)} is not a channel of this patch",
                Spelling.Hint(bad, channels) + "name labels of its channels");
        }
    }

    private void CheckBand(CheckedTable band, double rateHz, double analysisRateHz)
    {
        var (lowHz, highHz) = (band.Number("lowHz"), band.Number("highHz"));
        if (lowHz >= highHz)
        {
            Fault(band, "highHz", "it is not above lowHz", $"give a number above {SheetValues.Written(lowHz)} (Hz)");
        }

        var edge = lowHz >= 0.5 * rateHz ? "lowHz" : highHz >= 0.5 * rateHz ? "highHz" : null;
        if (edge is not null)
        {
            Fault(band, edge, "it is not below half the stream's rate", $"give a number below {SheetValues.Written(0.5 * rateHz)} (Hz)");
        }

        else if (highHz > Decimator.HighestShareOfRate * analysisRateHz)
        {
            var highest = SheetValues.Written(Decimator.HighestShareOfRate * analysisRateHz);
            Fault(
                band, "highHz", "it is above what is left whole at conditioning.analysisRateHz",
                $"give a number, at most {highest} (Hz), or raise the analysis rate");
        }

        RefuseTwice(band.Tables("wave"), "estimator");
        foreach (var wave in band.Tables("wave"))
        {
            var rowMs = 1000 / (double.IsNaN(analysisRateHz) ? rateHz : analysisRateHz);
            if (wave.Number("everyMs") >= rowMs || double.IsNaN(rowMs) || double.IsNaN(wave.Number("everyMs"))) continue;
            Fault(wave, "everyMs", "it is shorter than one row", $"give a number, at least {SheetValues.Written(rowMs)} (ms)");
        }
    }

    private void CheckRule(CheckedTable rule, CheckedTable sheet)
    {
        RefuseUnless(rule, "patch", rule.Text("patch"), sheet, "patch", "name");
        RefuseUnless(rule, "band", rule.Text("band"), sheet, "band", "name");
        foreach (var output in rule.Texts("outputs")) RefuseUnless(rule, "outputs", output, sheet, "output", "name");
        if (sheet.Tables("band").FirstOrDefault(b => b.Text("name") == rule.Text("band")) is { } band)
        {
            RefuseUnless(rule, "wave", rule.Text("wave"), band, "wave", "estimator");
        }

        foreach (var (one, other) in (ReadOnlySpan<(string, string)>)
            [("directionDegrees", "toleranceDegrees"), ("toleranceDegrees", "directionDegrees")])
        {
            if (!rule.Wrote(one) || rule.Wrote(other)) continue;
            Fault(rule, one, $"{other} is missing", $"give both, or neither for any direction; {other} takes {Takes(rule, other)}");
        }

        // The pulse leaves a lead after the deciding row, which is that old by then.
        if (sheet.Table("limits")?.Number("oldestDataMs") is { } oldestMs && rule.Number("leadMs") >= oldestMs)
        {
            Fault(
                rule, "leadMs", $"it is not below limits.oldestDataMs ({SheetValues.Written(oldestMs)}), so that no pulse could leave",
                "correct one of the two");
        }
    }

    private void CheckLimits(CheckedTable limits)
    {
        var (perMinute, perSession, intervalMs) =
            (limits.Whole("pulsesPerMinute"), limits.Whole("pulsesPerSession"), limits.Number("shortestIntervalMs"));

        // A limit that can never act is a slip: one of the two is not what was meant.
        if (perMinute > perSession)
        {
            Fault(limits, "pulsesPerMinute", $"it is more than pulsesPerSession allows ({perSession})", "correct one of the two");
        }

        if ((perMinute - 1) * intervalMs >= 60_000)
        {
            var most = SheetValues.Written((long)Math.Min(60_000, Math.Ceiling(60_000 / intervalMs)));
            Fault(limits, "pulsesPerMinute", $"with shortestIntervalMs there can't be more than {most}", "correct one of the two");
        }
    }

    private void RefuseTwice(IReadOnlyList<CheckedTable> tables, string name)
    {
        var lines = new Dictionary<string, int>(StringComparer.Ordinal);
        foreach (var table in tables)
        {
            if (table.Text(name) is not { } text || lines.TryAdd(text, table.LineOf(name))) continue;
            Fault(table, name, $"{SheetValues.Quoted(text)} is taken in line {lines[text]}", "give each its own");
        }
    }

    /// <summary>Refuses a text that is not the name of one of the tables in a list.</summary>
    private void RefuseUnless(CheckedTable table, string key, string? text, CheckedTable owner, string list, string name)
    {
        var among = owner.Tables(list);
        var names = among.Select(t => t.Text(name)).OfType<string>().ToArray();
        if (text is null || names.Contains(text, StringComparer.Ordinal)) return;

        // Where a name, or the whole list, was refused itself, it may be the one that is meant.
        if (names.Length < among.Count || (among.Count == 0 && owner.Wrote(list))) return;
        var advice = names.Length == 0 ? "there is none in this sheet" : "allowed: " + string.Join(", ", names);
        Fault(table, key, $"there is no {SheetValues.Quoted(text)}", Spelling.Hint(text, names) + advice);
    }

    private void FaultUnlessKnown(CheckedTable table, string key, string what, string advice)
    {
        if (!faults.Any(f => f.Key == SheetKeys.Join(table.Path, key) && f.Line == table.LineOf(key))) Fault(table, key, what, advice);
    }

    private void Fault(CheckedTable table, string key, string what, string advice) =>
        faults.Add(new(table.LineOf(key), SheetKeys.Join(table.Path, key), what, advice));

    private static string Takes(CheckedTable table, string key) => SheetKeys.Find(SheetKeys.Join(table.Path, key))?.Takes ?? "";
}
