using System.Text.Json.Nodes;
using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Recordings;

namespace LiveWave.App.Tests;

/// <summary>The verb <c>synth</c>, from a scene to files that other verbs can use.</summary>
public sealed class SynthTests : IDisposable
{
    private const string Scene = """
        [scene]
        name = "short"
        seconds = 4
        [stream]
        name = "short array"
        [band]
        lowHz = 14
        highHz = 22
        [[patch]]
        name = "quill"
        rows = 3
        columns = 4
        pitchMm = 0.4
        [background]
        localMicrovolts = 40
        sensorMicrovolts = 1.5
        [[event]]
        kind = "synchronous"
        onsetSeconds = 2.5
        durationSeconds = 0.4
        frequencyHz = 18
        snrDecibels = 6
        [[event]]
        kind = "planar"
        onsetSeconds = 1
        durationSeconds = 0.4
        frequencyHz = 18
        snrDecibels = 7.5
        directionDegrees = -45
        speedMetresPerSecond = 0.04
        [[fault]]
        kind = "gap"
        onsetSeconds = 3.2
        durationSeconds = 0.1
        """;

    private readonly Bench _bench = new();
    private readonly string _scene;

    public SynthTests()
    {
        _scene = _bench.At("short.scene.toml");
        File.WriteAllText(_scene, Scene);
    }

    public void Dispose() => _bench.Dispose();

    [Fact]
    public void The_recording_holds_the_rows_of_the_scene()
    {
        var run = ProgramRun.Of("synth", _scene, "--out", _bench.At("short.xdf"));

        Assert.Equal((ExitCode.Done, ""), (run.ExitCode, run.Error));
        var file = RecordingFile.Open(_bench.At("short.xdf"));
        Assert.Empty(file.Warnings);
        Assert.Equal(["short array", "truth"], file.Streams.Select(stream => stream.Name));
        using var recorded = file.OpenFeed("short array");
        using var made = new SceneFeed(SceneReader.Read(_scene));
        var (one, other) = (new SampleBlock(recorded.Format, 100), new SampleBlock(made.Format, 100));
        for (var rows = 0; rows < 3900; rows += one.Count)
        {
            Assert.Equal(PullResult.Samples, recorded.Pull(one, TimeSpan.Zero));
            Assert.Equal(PullResult.Samples, made.Pull(other, TimeSpan.Zero));
            for (var i = 0; i < one.Count; i++)
            {
                Assert.Equal(other.Row(i).ToArray(), one.Row(i).ToArray());
                Assert.Equal(other.RawStampSeconds(i), one.RawStampSeconds(i), 1e-6);
            }
        }

        Assert.Equal(PullResult.Ended, recorded.Pull(one, TimeSpan.Zero));
    }

    [Fact]
    public void The_truth_lies_beside_it_and_in_it()
    {
        var run = ProgramRun.Of("synth", _scene, "--out", _bench.At("short.xdf"), "--json");

        var truth = TruthTable.Read(_bench.At("short.truth.tsv"));
        Assert.Equal(["planar", "synchronous"], truth.Select(row => row.Kind));
        Assert.Equal((1, 0.4, 315.0, true), (truth[0].OnsetSeconds, truth[0].DurationSeconds, truth[0].DirectionDegrees, truth[0].IsStrong));
        var columns = File.ReadLines(Path.Combine(Bench.Bundled, "millrace.truth.tsv")).First();
        Assert.StartsWith(columns + "\t", File.ReadLines(_bench.At("short.truth.tsv")).First(), StringComparison.Ordinal);
        Assert.Equal(12, ElectrodeTable.Read(_bench.At("short_electrodes.tsv")).Count);
        var text = File.ReadAllText(_bench.At("short.xdf"), System.Text.Encoding.Latin1);
        Assert.Contains("{\"onsetSeconds\":1,\"durationSeconds\":0.4,\"patch\":\"quill\",\"kind\":\"planar\"", text, StringComparison.Ordinal);
        Assert.Contains("<is_synthetic>true</is_synthetic>", text, StringComparison.Ordinal);
        var summary = JsonNode.Parse(run.Output)!;
        Assert.Equal((4000, 100, 12), ((int)summary["rowsMade"]!, (int)summary["rowsLost"]!, (int)summary["channels"]!));
        Assert.Equal(1, (int)summary["events"]!["planar"]!);
    }

    [Fact]
    public void The_same_scene_gives_the_same_bytes()
    {
        _ = ProgramRun.Of("synth", _scene, "--out", _bench.At("one.xdf"));
        _ = ProgramRun.Of("synth", _scene, "--out", _bench.At("two.xdf"));

        Assert.Equal(File.ReadAllBytes(_bench.At("one.xdf")), File.ReadAllBytes(_bench.At("two.xdf")));
    }

    [Theory]
    [InlineData("short.xdf")]
    [InlineData("short.truth.tsv")]
    [InlineData("short_electrodes.tsv")]
    public void Nothing_is_overwritten(string name)
    {
        File.WriteAllText(_bench.At(name), "mine");

        var run = ProgramRun.Of("synth", _scene, "--out", _bench.At("short.xdf"));

        Assert.Equal(ExitCode.Refused, run.ExitCode);
        Assert.Contains("there already", run.Error, StringComparison.Ordinal);
        Assert.Equal("mine", File.ReadAllText(_bench.At(name)));
    }

    [Fact]
    public void A_request_that_is_wrong_ends_with_two_and_one_line()
    {
        foreach (var args in (string[][])[["synth"], ["synth", _scene], ["synth", _bench.At("none.toml"), "--out", _bench.At("x.xdf")], ["synth", _scene, "--out", _bench.At("none/x.xdf")]])
        {
            var run = ProgramRun.Of(args);

            Assert.Equal(ExitCode.Refused, run.ExitCode);
            Assert.Contains("livewave: ", run.Error, StringComparison.Ordinal);
            Assert.DoesNotContain("   at ", run.Error, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void Every_key_of_a_scene_is_in_its_reference()
    {
        var run = ProgramRun.Of("synth", "--keys");

        Assert.Equal(ExitCode.Done, run.ExitCode);
        Assert.All(Pipeline.SceneKeys.Lookup.All, key => Assert.Contains(key.Heading, run.Output, StringComparison.Ordinal));
    }
}
