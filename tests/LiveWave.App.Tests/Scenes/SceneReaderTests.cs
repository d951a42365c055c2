using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.App.Tests;

/// <summary>Scenes that are right, and everything that may be wrong with one.</summary>
public sealed class SceneReaderTests
{
    private const string Least = """
        [scene]
        name = "least"
        seconds = 10

        [[patch]]
        name = "quill"
        rows = 4
        columns = 4
        pitchMm = 0.4

        """;

    private const string Wave = """
        [[event]]
        kind = "planar"
        onsetSeconds = 1
        durationSeconds = 0.4
        frequencyHz = 18
        amplitudeMicrovolts = 20
        directionDegrees = 135
        wavelengthMm = 3

        """;

    private const string Fault = """
        [[fault]]
        kind = "bad"
        channels = ["r1c1"]
        microvolts = 30

        """;

    public static TheoryData<string, string, string, string> Slips => new()
    {
        { "seconds = 10", "second = 10", "scene.toml:3: scene.second", "did you mean 'seconds'?" },
        { "seconds = 10", "", "scene.toml:1: scene.seconds", "missing" },
        { "seconds = 10", "seconds = 0", "scene.seconds", "it is 0" },
        { "seconds = 10", "seconds = 1.2", "event.onsetSeconds", "after the scene's end" },
        { "rows = 4", "", "patch.rows", "missing" },
        { "rows = 4\ncolumns = 4", "rows = 2\ncolumns = 1\nwithoutCorners = true", "patch.withoutCorners", "nothing is left" },
        { "rows = 4", "rows = 4\nelectrodes = \"e.tsv\"", "patch.rows", "the patch has a table" },
        { "\"planar\"", "\"planer\"", "event.kind", "did you mean 'planar'?" },
        { "\"planar\"", "\"front\"", "event.kind", "not yet built" },
        { "\"planar\"", "\"standing\"\nmechanism = \"relay\"", "event.mechanism", "not yet built" },
        { "\"planar\"", "\"synchronous\"", "event.wavelengthMm", "no meaning for synchronous" },
        { "\"planar\"", "\"rotating-clockwise\"", "event.wavelengthMm", "no meaning" },
        { "wavelengthMm = 3", "", "event.speedMetresPerSecond", "give speedMetresPerSecond or wavelengthMm" },
        { "wavelengthMm = 3", "wavelengthMm = 3\nspeedMetresPerSecond = 0.1", "event.speedMetresPerSecond", "wavelengthMm is there too" },
        { "directionDegrees = 135", "", "event.directionDegrees", "planar needs it" },
        { "amplitudeMicrovolts = 20", "", "event.snrDecibels", "give snrDecibels or amplitudeMicrovolts" },
        { "amplitudeMicrovolts = 20", "snrDecibels = 6", "event.snrDecibels", "no [band]" },
        { "frequencyHz = 18", "frequencyHz = 500", "event.frequencyHz", "half the rate" },
        { "frequencyHz = 18", "frequencyHz = 18\nrepeats = 3", "event.everySeconds", "a series needs it" },
        { "frequencyHz = 18", "frequencyHz = 18\nflankMs = 300", "event.flankMs", "longer than the event" },
        { "frequencyHz = 18", "frequencyHz = 18\npatch = \"quil\"", "event.patch", "did you mean 'quill'?" },
        { "\"bad\"", "\"dying\"", "fault.durationSeconds", "dying needs it" },
        { "\"bad\"", "\"swapped\"", "fault.channels", "name two" },
        { "\"r1c1\"", "\"r9c9\"", "fault.channels", "there is no channel 'r9c9'" },
        { "columns = 4", "columns = 4\n[band]\nlowHz = 20\nhighHz = 10", "band.highHz", "not above lowHz" },
        { "[scene]", "[scene", "scene.toml:1", "not valid TOML" },
    };

    [Fact]
    public void The_least_scene_is_silent_and_has_its_defaults()
    {
        var scene = SceneReader.Parse(Least, "scene.toml");

        Assert.Equal(("least", 1UL, 10.0, 1000.0, WireFormat.Int16), (scene.Name, scene.Seed, scene.Seconds, scene.RateHz, scene.Wire));
        Assert.Equal(16, scene.ChannelCount);
        Assert.Equal(new SceneBackground(), scene.Background);
        Assert.Null(scene.Rhythm);
        Assert.Empty(scene.Events);
    }

    [Fact]
    public void An_event_and_a_fault_are_read_key_by_key()
    {
        var scene = SceneReader.Parse(Least + Wave + Fault, "scene.toml");

        var wave = Assert.Single(scene.Events);
        Assert.Equal(
            ("quill", WaveKind.Planar, 1.0, 0.4, 30.0, 18.0, 20.0, 135.0, 3.0),
            (wave.Patch, wave.Kind, wave.OnsetSeconds, wave.DurationSeconds, wave.FlankMs, wave.FrequencyHz, wave.AmplitudeMicrovolts, wave.DirectionDegrees, wave.WavelengthMm));
        var fault = Assert.Single(scene.Faults);
        Assert.Equal((SceneFaultKind.Bad, 0.0, double.PositiveInfinity, 30.0), (fault.Kind, fault.OnsetSeconds, fault.DurationSeconds, fault.Microvolts));
    }

    [Theory]
    [MemberData(nameof(Slips))]
    public void A_slip_is_refused_with_its_place_and_what_to_do(string what, string by, string where, string says)
    {
        var text = Least + Wave + Fault;
        Assert.Contains(what, text, StringComparison.Ordinal);

        var refused = Assert.Throws<RefusedException>(() => SceneReader.Parse(text.Replace(what, by, StringComparison.Ordinal), "scene.toml"));

        Assert.Contains(where, refused.Message, StringComparison.Ordinal);
        Assert.Contains(says, refused.Message, StringComparison.Ordinal);
    }

    /// <summary>Whatever a byte is changed to: a scene, or one refusal.</summary>
    [Fact]
    public void A_damaged_scene_is_read_or_refused_and_nothing_else()
    {
        var text = File.ReadAllText(Path.Combine(Bench.Bundled, "fenmarsh-waves.scene.toml"));
        for (var at = 400; at < text.Length; at += 61)
        {
            foreach (var by in "\"]=9#\\")
            {
                var damaged = text[..at] + by + text[(at + 1)..];
                if (Record.Exception(() => SceneReader.Parse(damaged, "scene.toml")) is { } error) Assert.IsType<RefusedException>(error);
            }
        }
    }

    [Fact]
    public void The_bundled_scenes_can_be_played()
    {
        var waves = SceneReader.Read(Path.Combine(Bench.Bundled, "fenmarsh-waves.scene.toml"));
        var baseline = SceneReader.Read(Path.Combine(Bench.Bundled, "fenmarsh-baseline.scene.toml"));

        Assert.Equal(300, baseline.Seconds);
        Assert.Empty(baseline.Events);
        Assert.Equal((waves.Background, waves.Rhythm, waves.Rig), (baseline.Background, baseline.Rhythm, baseline.Rig));
        using var feed = new SceneFeed(waves);
        Assert.Equal(8, feed.Truth.Select(truth => truth.Event.Kind).Distinct().Count());
        Assert.Equal(4, feed.Truth.Where(truth => truth.Event.Kind == WaveKind.InPhase).Select(truth => truth.Event.Shape).Distinct().Count());
        Assert.All(feed.Truth, truth => Assert.InRange(truth.OnsetSeconds + truth.Event.DurationSeconds, 0, 80));
    }
}
