using System.Text.Json.Nodes;
using LiveWave.Recordings;

namespace LiveWave.App.Tests;

/// <summary>The bundled session from the recording to the folder, as a new user runs it.</summary>
public sealed class DemoTests : IClassFixture<DemoTests.WholeDemo>
{
    private readonly WholeDemo _demo;

    public DemoTests(WholeDemo demo) => _demo = demo;

    [Fact]
    public void It_ends_well_and_rehearses_every_pulse_on_its_instant()
    {
        Assert.Equal(ExitCode.Done, _demo.Run.ExitCode);
        var outcomes = _demo.Summary["outcomes"]!;
        var decisions = _demo.Summary["decisions"]!;
        Assert.Equal((int)decisions["pulse"]!, (int)outcomes["rehearsed"]!);
        Assert.Equal((int)decisions["sham"]!, (int)outcomes["withheld"]!);
        Assert.Equal(0, (int)outcomes["sent"]!);
    }

    [Fact]
    public void It_finds_the_strong_waves_with_their_directions_and_takes_no_decoy_for_a_wave()
    {
        var truth = _demo.Summary["truth"]!;

        Assert.Equal(25, (int)truth["strong"]!);
        Assert.InRange((int)truth["strongFound"]!, 24, 25);
        Assert.InRange((double)truth["medianDirectionErrorDegrees"]!, 0, 8);
        Assert.Equal(20, (int)truth["decoys"]!);
        Assert.InRange((int)truth["decoysTaken"]!, 0, 1);
    }

    [Fact]
    public void Its_decisions_are_the_approved_ones()
    {
        var approved = File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Approved", "demo.decisions.tsv"));

        Assert.Equal(approved.ReplaceLineEndings("\n"), File.ReadAllText(_demo.At("decisions.tsv")));
    }

    /// <summary>Outside check: the reference chain in Python (numpy 1.24.2, SciPy 1.10.1, <c>tools/golden/millrace</c>) on the same file.</summary>
    [Fact]
    public void Its_events_begin_and_pass_at_the_frames_of_the_reference_chain_and_point_where_it_points()
    {
        var reference = JsonNode.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "millrace.reference.json")))!["events"]!.AsArray();
        var events = BidsTable.Read(_demo.At("events.tsv"));

        Assert.Equal(reference.Count, events.RowCount);
        for (var i = 0; i < reference.Count; i++)
        {
            var expected = reference[i]!;
            Assert.Equal((int)expected["onsetFrame"]!, Frame(events.Number(i, "onset")));
            Assert.Equal((int)expected["triggerFrame"]!, Frame(events.Number(i, "passed")));
            Assert.Equal((double)expected["directionDegrees"]!, events.Number(i, "direction_degrees"), 0.01);
            Assert.Equal((double)expected["seAtTrigger"]!, events.Number(i, "direction_standard_error_degrees"), 0.01);
        }
    }

    /// <summary>That the path itself allocates nothing is held by <c>StreamLoopTests</c>; a whole process on a busy machine was seen to
    /// spend 4 kB once, in 78 000 rows.</summary>
    [Fact]
    public void The_decision_thread_allocates_next_to_nothing_while_it_judges() =>
        Assert.InRange((long)_demo.Summary["decisionThreadBytes"]!, 0, 16_384);

    [Fact]
    public void The_session_folder_holds_every_file_that_the_readme_lists()
    {
        string[] listed =
        [
            "clock.tsv", "decisions.tsv", "events.tsv", "latency.hlog", "latency.tsv", "millrace.calibration.json", "outcomes.tsv",
            "run.log.jsonl", "session.json", "sheet.toml", "summary.json", "summary.txt",
        ];

        Assert.Equal(listed, Directory.EnumerateFiles(_demo.Folder).Select(Path.GetFileName).Order(StringComparer.Ordinal));
        Assert.Equal(1 + _demo.Decisions, File.ReadAllLines(_demo.At("decisions.tsv")).Length);
        Assert.Equal(1 + _demo.Decisions, File.ReadAllLines(_demo.At("outcomes.tsv")).Length);
        Assert.All(File.ReadAllLines(_demo.At("run.log.jsonl")), line => Assert.NotNull(JsonNode.Parse(line)));
    }

    [Fact]
    public void The_session_names_neither_the_machine_nor_whoever_uses_it()
    {
        var text = string.Concat(Directory.EnumerateFiles(_demo.Folder, "*.json*").Select(File.ReadAllText));

        Assert.DoesNotContain(Environment.MachineName, text, StringComparison.Ordinal);
    }

    [Fact]
    public void The_help_of_every_verb_and_the_list_of_keys_are_there()
    {
        Assert.Contains("watch", ProgramRun.Of("--help").Output, StringComparison.Ordinal);
        Assert.Contains("--block-rows", ProgramRun.Of("demo", "--help").Output, StringComparison.Ordinal);
        Assert.Contains("--from", ProgramRun.Of("watch", "--help").Output, StringComparison.Ordinal);
        Assert.Contains("directionDegrees", ProgramRun.Of("watch", "--keys").Output, StringComparison.Ordinal);
    }

    private static int Frame(double seconds) => (int)Math.Round(seconds * 250);

    public sealed class WholeDemo : IDisposable
    {
        private readonly DirectoryInfo _parent = Directory.CreateTempSubdirectory("livewave-test-");

        public WholeDemo()
        {
            Run = ProgramRun.Of("demo", "--json", "--out", Folder);
            Summary = JsonNode.Parse(Run.Output)!;
        }

        public string Folder => Path.Combine(_parent.FullName, "session");

        public JsonNode Summary { get; }

        public int Decisions => Summary["decisions"]!.AsObject().Sum(pair => (int)pair.Value!);

        internal ProgramRun Run { get; }

        public string At(string name) => Path.Combine(Folder, name);

        public void Dispose() => _parent.Delete(recursive: true);
    }
}
