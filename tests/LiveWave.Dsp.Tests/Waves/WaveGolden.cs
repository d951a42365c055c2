using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>
/// Golden/waves.json: layouts, frames, both gates and slowness intervals by the reference programme of our wave study (sections 3,
/// 4.6-4.8b, 6c; acceptance lines 1 and 19), cut by tools/golden/wave_vectors.py.
/// </summary>
internal static class WaveGolden
{
    public static readonly JsonElement Root = JsonDocument
        .Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "waves.json"))).RootElement;

    public static IEnumerable<TheoryDataRow<string>> Names(string list) =>
        Root.GetProperty(list).EnumerateArray().Select(entry => new TheoryDataRow<string>(entry.GetProperty("id").GetString()!));

    public static JsonElement Case(string list, string id) =>
        Root.GetProperty(list).EnumerateArray().Single(entry => entry.GetProperty("id").GetString() == id);

    public static double Number(this JsonElement entry, string key) => entry.GetProperty(key).GetDouble();

    public static double[] Numbers(this JsonElement entry, string key) =>
        [.. entry.GetProperty(key).EnumerateArray().Select(value => value.GetDouble())];

    public static Layout Layout(JsonElement entry)
    {
        var bad = entry.TryGetProperty("bad_channels", out var list) ? list.EnumerateArray().Select(v => v.GetInt32()).ToHashSet() : [];
        var name = entry.GetProperty(entry.TryGetProperty("layout", out _) ? "layout" : "name").GetString();
        var positions = Root.GetProperty("layouts").EnumerateArray().First(found => found.GetProperty("name").GetString() == name);
        return new Layout([.. positions.GetProperty("xy_mm").EnumerateArray()
            .Select((place, i) => new Electrode($"e{i}", place[0].GetDouble(), place[1].GetDouble(), !bad.Contains(i)))]);
    }

    // 0.95 exp(−D/(0.5 L)) + 0.05 on the diagonal.
    public static NoiseModel Noise(Layout layout)
    {
        var geometry = new ArrayGeometry(layout);
        var n = geometry.ChannelCount;
        var covariance = new double[n * n];
        for (var i = 0; i < covariance.Length; i++)
        {
            var (a, b) = (i / n, i % n);
            var distance = Math.Sqrt(Math.Pow(geometry.XMm[a] - geometry.XMm[b], 2) + Math.Pow(geometry.YMm[a] - geometry.YMm[b], 2));
            covariance[i] = 0.95 * Math.Exp(-distance / (0.5 * geometry.ApertureMm)) + (a == b ? 0.05 : 0);
        }

        return new NoiseModel(covariance, 0.01, "fitted", double.NaN);
    }

    // z lists good channels only.
    public static Phasors Phasors(JsonElement entry, Layout layout, long index = 0)
    {
        var phasors = new Phasors(layout.Electrodes.Count) { At = new RowInstant(index, index, index / 1000.0) };
        foreach (var (channel, z) in layout.GoodChannels().Zip(entry.GetProperty("z").EnumerateArray()))
        {
            (phasors.Re[channel], phasors.Im[channel]) = (z[0].GetDouble(), z[1].GetDouble());
            phasors.Validity[channel] = Validity.Observed;
        }

        return phasors;
    }

    public static (WhitenedFrame Frame, ArrayGeometry Geometry, TemplateBank Bank) Whitened(JsonElement entry)
    {
        var layout = Layout(entry);
        var geometry = new ArrayGeometry(layout);
        var whitening = new Whitening(Noise(layout), geometry.ChannelCount);
        var frame = new WhitenedFrame(geometry.Channels, [.. geometry.Channels.Select(_ => 1.0)], whitening);
        Assert.True(frame.Take(Phasors(entry, layout)));
        return (frame, geometry, new TemplateBank(whitening, Array.ConvertAll(geometry.HalfGrid, geometry.Phases)));
    }

    public static Reading Read(JsonElement entry, double threshold)
    {
        var layout = Layout(entry);
        var calibration = new Calibration
        {
            Patch = "array",
            Band = "alpha",
            Noise = Noise(layout),
            Thresholds = [new KindThreshold(WaveKind.Planar, [threshold], double.NaN, null, null)],
        };
        return WaveFrames.Read(layout, calibration, new PlanarOptions(), Phasors(entry, layout));
    }
}
