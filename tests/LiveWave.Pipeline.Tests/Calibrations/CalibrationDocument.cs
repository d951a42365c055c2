using System.Text.Json.Nodes;

namespace LiveWave.Pipeline.Tests;

/// <summary>A small sound calibration as JSON, to be broken in one place at a time.</summary>
internal static class CalibrationDocument
{
    public const string Text = """
        {
          "format": "livewave-calibration", "version": 1, "madeBy": "a test", "provenance": { "seed": 4102 },
          "entries": [ {
            "patch": "quill", "band": "beta",
            "fingerprint": {
              "channels": ["r1c1", "r1c2", "r2c1"], "positionsMm": [[0, 0], [0.4, 0], [0, 0.4]],
              "rateHz": 1000, "lowHz": 14, "highHz": 22, "conditioning": ["notch 50 Hz"],
              "phaseEstimator": "oscillator", "waveEstimator": "planar", "samplesPerFrame": 4,
              "event": { "minimumMs": 60, "stabilityMs": 61, "stabilityDegrees": 25, "gapMs": 20, "refractoryMs": 100 } },
            "unit": "microvolts",
            "phaseModel": {
              "rateHz": 1000,
              "oscillators": [ { "poleRe": 0.98, "poleIm": 0.11, "driveVariance": 0.001, "isTarget": true },
                               { "poleRe": 0.9, "poleIm": 0.3, "driveVariance": 0.002, "isTarget": false } ],
              "background": [ { "pole": 0.99, "driveVariance": 0.007 } ],
              "whiteVariance": 0.005 },
            "channelScale": [41.5, 58.1, 37.5], "channelRms": [5.1, 7.2, 4.3],
            "noise": { "covariance": [[1, 0.5, 0.25], [0.5, 1.1, 0.125], [0.25, 0.125, 0.9]],
                       "loading": 0.01, "model": "fitted", "misfit": 0.02, "frames": 74750 },
            "thresholds": [ {
              "kind": "planar", "sectors": 2, "enter": [-4, 5.5],
              "falseEventsPerMinute": {
                "nominal": 1, "surrogate": 0.5, "surrogateCount": 15, "surrogateMinutes": 30, "surrogateLow": 0.28, "surrogateHigh": 0.83,
                "baseline": 0, "baselineCount": 0, "baselineMinutes": 4.9, "baselineLow": 0, "baselineHigh": 0.75 } } ]
          } ]
        }
        """;

    /// <summary>The document with one value replaced, or taken out where <paramref name="json"/> is empty.</summary>
    /// <param name="path">Keys and list places, separated by slashes.</param>
    /// <param name="json">The new value.</param>
    public static string With(string path, string json)
    {
        var root = JsonNode.Parse(Text)!;
        var parts = path.Split('/');
        var parent = parts.SkipLast(1).Aggregate(root, (node, part) => node is JsonArray list ? list[int.Parse(part)]! : node[part]!);
        var last = parts[^1];
        if (json.Length == 0) parent.AsObject().Remove(last);
        else if (parent is JsonArray list) list[int.Parse(last)] = JsonValue.Create("@@");
        else parent[last] = JsonValue.Create("@@");
        return root.ToJsonString().Replace("\"@@\"", json, StringComparison.Ordinal);
    }
}
