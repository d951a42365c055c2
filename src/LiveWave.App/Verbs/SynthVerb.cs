using System.Globalization;
using System.Xml.Linq;
using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>The verb <c>synth</c>: from a scene to a recording with known truth.</summary>
/// <remarks>Beside the recording NAME.xdf lie NAME.truth.tsv and, for each patch, NAME_electrodes.tsv (NAME_PATCH_electrodes.tsv where
/// there are several). Nothing is overwritten.</remarks>
internal static class SynthVerb
{
    private const int BlockRows = 500;
    private const int Samples = 0;
    private const int Truth = 1;
    private static readonly TimeSpan Turn = TimeSpan.FromMilliseconds(500);

    /// <exception cref="RefusedException">The scene can't be played, or a file is there already or can't be made.</exception>
    public static int Run(SynthOptions options)
    {
        var scene = SceneReader.Read(options.ScenePath);
        using var feed = new SceneFeed(scene);
        var truth = TruthTable.PathBeside(options.Out);
        var electrodes = scene.Patches.ToDictionary(patch => ElectrodesBeside(options.Out, scene, patch), patch => patch);
        foreach (var path in (string[])[truth, .. electrodes.Keys]) RefuseIfThere(path);
        using (var writer = new XdfWriter(options.Out, [SamplesHead(scene, feed), TruthHead(scene)]))
        {
            Write(scene, feed, writer, isShown: !options.Json && !Console.IsErrorRedirected);
        }

        File.WriteAllText(truth, SceneTruthText.Table(feed.Truth));
        foreach (var (path, patch) in electrodes) File.WriteAllText(path, SceneTruthText.Electrodes(patch));
        var summary = new SynthSummary(scene, feed, options, truth, [.. electrodes.Keys], new FileInfo(options.Out).Length);
        Console.Out.Write(options.Json ? summary.Json() : summary.Text());
        return ExitCode.Done;
    }

    private static void Write(Scene scene, SceneFeed feed, XdfWriter writer, bool isShown)
    {
        var block = new SampleBlock(feed.Format, BlockRows);
        var (marker, shown) = (0, WallClock.Time.GetTimestamp());
        while (feed.Pull(block, TimeSpan.Zero) == PullResult.Samples)
        {
            for (var i = 0; i < block.Count; i++)
            {
                var stamp = block.RawStampSeconds(i);
                for (; marker < feed.Truth.Count && OnsetStamp(scene, feed.Truth[marker]) <= stamp; marker++)
                {
                    writer.Append(Truth, OnsetStamp(scene, feed.Truth[marker]), SceneTruthText.Marker(feed.Truth[marker]));
                }

                writer.Append(Samples, stamp, block.Row(i));
            }

            if (!isShown || WallClock.Time.GetElapsedTime(shown) < Turn) continue;
            shown = WallClock.Time.GetTimestamp();
            Console.Error.Write(string.Create(CultureInfo.InvariantCulture, $"\r{feed.RowsMade / scene.RateHz:F0} of {scene.Seconds:F0} s made "));
        }

        if (isShown) Console.Error.Write("\r" + new string(' ', 40) + "\r");
    }

    private static double OnsetStamp(Scene scene, SceneTruth truth) => scene.FirstStampSeconds + truth.OnsetSeconds;

    private static string ElectrodesBeside(string recording, Scene scene, ScenePatch patch)
    {
        var name = Path.GetFileNameWithoutExtension(recording) + (scene.Patches.Count == 1 ? "" : "_" + patch.Name) + "_electrodes.tsv";
        return Path.Combine(Path.GetDirectoryName(recording) ?? "", name);
    }

    private static void RefuseIfThere(string path)
    {
        if (File.Exists(path)) throw new RefusedException("the file is there already", path, "give another --out: nothing is overwritten");
    }

    private static XdfStreamHead SamplesHead(Scene scene, SceneFeed feed)
    {
        var electrodes = scene.Patches.SelectMany(patch => patch.Layout.Electrodes);
        var notes = Synthetic(scene);
        notes.Add(new XElement("array", new XElement("frame", "the array's own: x right, y up, millimetres, seen from above")));
        notes.Add(new XElement("synchronization", new XElement("can_drop_samples", scene.Faults.Any(f => f.Kind == SceneFaultKind.Gap) ? "true" : "false")));
        return new()
        {
            Name = scene.StreamName,
            Type = "LFP",
            SourceId = "synthetic-" + scene.Name,
            RateHz = scene.RateHz,
            Wire = scene.Wire,
            Channels =
            [
                .. electrodes.Zip(feed.Format.Channels, (place, channel) =>
                    new RecordedChannel(channel.Label, channel.Unit, channel.Scale, place.XMm, place.YMm)),
            ],
            Notes = notes,
        };
    }

    private static XdfStreamHead TruthHead(Scene scene) =>
        XdfStreamHead.Markers("truth", "synthetic-truth-" + scene.Name, Synthetic(scene));

    private static List<XElement> Synthetic(Scene scene) =>
    [
        new XElement(
            "synthetic",
            new XElement("is_synthetic", "true"),
            new XElement("scene", scene.Name),
            new XElement("seed", scene.Seed.ToString(CultureInfo.InvariantCulture))),
    ];
}
