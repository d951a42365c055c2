using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.App;

/// <summary>What <c>synth</c> says when it is done, for people and for programs.</summary>
internal sealed class SynthSummary(
    Scene scene, SceneFeed feed, SynthOptions options, string truth, IReadOnlyList<string> electrodes, long bytes)
{
    private static readonly JsonSerializerOptions Indented = new() { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    private readonly (string Kind, int Count)[] _kinds =
        [.. feed.Truth.CountBy(one => one.Event.Kind).OrderBy(pair => pair.Key).Select(pair => (WaveKinds.Word(pair.Key), pair.Value))];

    public string Json()
    {
        var counts = new JsonObject();
        foreach (var (kind, count) in _kinds) counts[kind] = count;
        return new JsonObject
        {
            ["verb"] = "synth",
            ["scene"] = scene.Name,
            ["seed"] = scene.Seed,
            ["file"] = options.Out,
            ["bytes"] = bytes,
            ["stream"] = scene.StreamName,
            ["channels"] = feed.Format.ChannelCount,
            ["rateHz"] = scene.RateHz,
            ["seconds"] = scene.Seconds,
            ["rowsMade"] = feed.RowsMade,
            ["rowsLost"] = feed.RowsLost,
            ["backgroundInBandMicrovolts"] = feed.BandMicrovolts,
            ["events"] = counts,
            ["faults"] = scene.Faults.Count,
            ["truth"] = truth,
            ["electrodes"] = new JsonArray([.. electrodes.Select(path => (JsonNode)path)]),
        }.ToJsonString(Indented) + "\n";
    }

    public string Text()
    {
        var lost = feed.RowsLost == 0 ? "" : $", {feed.RowsLost} rows lost on purpose";
        var events = _kinds.Length == 0 ? "none" : string.Join(", ", _kinds.Select(pair => $"{pair.Count} {pair.Kind}"));
        var band = feed.BandMicrovolts == 0 ? "" : $"in band    background of {feed.BandMicrovolts:F2} microvolts, to which SNRs refer\n";
        return string.Create(
            CultureInfo.InvariantCulture,
            $"scene      {scene.Name}: invented data, seed {scene.Seed}\n")
            + string.Create(
                CultureInfo.InvariantCulture,
                $"recording  {options.Out}: '{scene.StreamName}', {feed.Format.ChannelCount} channels, {scene.RateHz} Hz, {scene.Seconds} s{lost}, {bytes / 1e6:F1} MB\n")
            + $"events     {events}\n" + band
            + $"truth      {truth}\n"
            + $"electrodes {string.Join(", ", electrodes)}\n";
    }
}
