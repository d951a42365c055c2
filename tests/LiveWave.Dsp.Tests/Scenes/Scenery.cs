using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Scenes for tests, played to their end, and what a steady stretch of a row says.</summary>
internal static class Scenery
{
    public static readonly ScenePatch Grid = ScenePatch.Grid("quill", 8, 8, 0.4, withoutCorners: true);

    public static Scene Silent(double seconds, ScenePatch? patch = null, params SceneEvent[] events) => new()
    {
        Name = "test",
        Seconds = seconds,
        Wire = WireFormat.Float32,
        Patches = [patch ?? Grid],
        Events = events,
    };

    public static SceneEvent Wave(WaveKind kind, double frequencyHz = 11) => new()
    {
        Patch = "quill",
        Kind = kind,
        OnsetSeconds = 0,
        DurationSeconds = 2,
        FrequencyHz = frequencyHz,
        AmplitudeMicrovolts = 100,
    };

    /// <summary>All rows, with their stamps.</summary>
    public static (double[][] Rows, double[] Stamps) Play(Scene scene, int blockRows = 100)
    {
        using var feed = new SceneFeed(scene);
        var block = new SampleBlock(feed.Format, blockRows);
        var (rows, stamps) = (new List<double[]>(), new List<double>());
        while (feed.Pull(block, TimeSpan.Zero) == PullResult.Samples)
        {
            Assert.Equal(rows.Count, block.FirstReceived);
            for (var i = 0; i < block.Count; i++)
            {
                rows.Add(block.Row(i).ToArray());
                stamps.Add(block.RawStampSeconds(i));
            }
        }

        Assert.Equal(0, block.Count);
        return ([.. rows], [.. stamps]);
    }

    /// <summary>Complex amplitude of each channel at a frequency, over the second from 0.5 s on: phase 0 = peak at 0.5 s.</summary>
    public static (double Modulus, double Phase)[] Demodulated(Scene scene, double frequencyHz)
    {
        var (rows, _) = Play(scene);
        var (first, count) = ((int)(0.5 * scene.RateHz), (int)scene.RateHz);
        return
        [
            .. Enumerable.Range(0, rows[0].Length).Select(channel =>
            {
                var (re, im) = (0.0, 0.0);
                for (var i = 0; i < count; i++)
                {
                    var angle = 2 * Math.PI * frequencyHz * i / scene.RateHz;
                    re += rows[first + i][channel] * Math.Cos(angle) * 2 / count;
                    im -= rows[first + i][channel] * Math.Sin(angle) * 2 / count;
                }

                return (Math.Sqrt((re * re) + (im * im)), Math.Atan2(im, re));
            }),
        ];
    }

    public static double Wrapped(double radians) => radians - (2 * Math.PI * Math.Round(radians / (2 * Math.PI)));

    /// <summary>Power density of a channel, one-sided, by Hann segments of a second, half overlapped (Welch 1967); index = Hz.</summary>
    public static double[] Density(double[][] rows, int channel, double rateHz, int upToHz)
    {
        var length = (int)rateHz;
        var density = new double[upToHz + 1];
        var window = Enumerable.Range(0, length).Select(i => 0.5 - (0.5 * Math.Cos(2 * Math.PI * i / length))).ToArray();
        var segments = 0;
        for (var start = 0; start + length <= rows.Length; start += length / 2, segments++)
        {
            for (var hz = 1; hz <= upToHz; hz++)
            {
                // Goertzel's recursion: one bin at a time.
                var (twice, one, two) = (2 * Math.Cos(2 * Math.PI * hz / length), 0.0, 0.0);
                for (var i = 0; i < length; i++) (one, two) = ((window[i] * rows[start + i][channel]) + (twice * one) - two, one);
                density[hz] += (one * one) + (two * two) - (twice * one * two);
            }
        }

        return [.. density.Select(sum => 2 * sum / (segments * 0.375 * length * rateHz))];
    }
}
