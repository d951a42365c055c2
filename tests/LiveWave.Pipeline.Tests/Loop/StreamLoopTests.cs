using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

public sealed class StreamLoopTests
{
    [Fact]
    public void Two_patches_in_two_bands_run_through_one_loop_each_with_its_own_readings()
    {
        var setup = Rig.Setup(patches: 2, (14, 22), (28, 40));

        var rig = Rig.Play(setup, new FakeFeed(setup.Format, Rig.Rows(setup, seconds: 12)), blockRows: 20);

        var tracks = rig.Readings.GroupBy(reading => (reading.Patch, reading.Band)).ToList();
        Assert.Equal(4, tracks.Count);
        Assert.Single(tracks.Select(track => track.Count()).Distinct());
        Assert.Equal(4, rig.Events.Select(wave => (wave.Patch, wave.Band)).Distinct().Count());
        Assert.Equal(["rule-0", "rule-1"], rig.Decisions.Select(decision => decision.Rule).Distinct().Order());
        Assert.Equal(rig.Events.Select(wave => wave.Number).Distinct().Count(), rig.Events.Max(wave => wave.Number));
    }

    [Fact]
    public void A_second_patch_changes_nothing_for_the_first()
    {
        var two = Rig.Setup(patches: 2);
        var one = two with { Patches = [two.Patches[0]], Tracks = [two.Tracks[0]] };
        var rows = Rig.Rows(one, seconds: 8);

        var alone = Rig.Play(one, new FakeFeed(one.Format, rows), blockRows: 20).Readings;
        var beside = Rig.Play(two, new FakeFeed(two.Format, rows), blockRows: 20).Readings.Where(reading => reading.Patch == "patch-0");

        Assert.Equal(alone, beside);
    }

    [Fact]
    public void Lost_rows_are_bridged_on_the_grid_and_the_run_goes_on()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 12);
        var kept = Enumerable.Range(0, rows.Length).Where(i => i is < 2000 or >= 2015).ToArray();
        var feed = new FakeFeed(setup.Format, [.. kept.Select(i => rows[i])], [.. kept.Select(i => 100 + (i / 500.0))]);

        var whole = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 20);
        var rig = Rig.Play(setup, feed, blockRows: 20);

        Assert.Equal(whole.Decisions.TakeWhile(decision => decision.At.Index < 1900), rig.Decisions.TakeWhile(decision => decision.At.Index < 1900));
        var after = rig.Decisions.Where(decision => decision.At.Index > 3500).ToList();
        Assert.NotEmpty(after);
        Assert.All(after, decision => Assert.Equal(decision.At.Index - 15, decision.At.Received));
    }

    [Fact]
    public void A_restart_ends_what_passes_and_starts_every_stage_from_rest()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 8);
        double[][] twice = [.. rows, .. rows];
        var stamps = Enumerable.Range(0, twice.Length).Select(i => 100 + (i % rows.Length / 500.0)).ToArray();
        var feed = new FakeFeed(setup.Format, twice, stamps).RestartBefore(rows.Length);

        var once = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 20).Readings;
        var rig = Rig.Play(setup, feed, blockRows: 20).Readings;

        Assert.Equal(
            once.Select(reading => (reading.Statistic, reading.DirectionDegrees)),
            rig.Skip(rig.Count - once.Count).Select(reading => (reading.Statistic, reading.DirectionDegrees)));
    }

    [Fact]
    public void Steady_state_allocates_nothing_on_the_way_to_a_decision()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 20);
        var core = new DecisionCore(setup, (where, error) => Assert.Fail($"{where}: {error}"));
        for (var i = 0; i < 5000; i++) Step(core, rows, i);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 5000; i < rows.Length; i++) Step(core, rows, i);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }

    [Fact]
    public void A_failing_estimator_ends_its_band_and_disarms_and_the_others_go_on()
    {
        var setup = Rig.Setup(patches: 2);
        var broken = setup with
        {
            Tracks = [setup.Tracks[0] with { MakePhase = () => new FailingPhase(afterRows: 2000) }, setup.Tracks[1]],
        };

        var rig = Rig.Play(broken, new FakeFeed(setup.Format, Rig.Rows(setup, seconds: 8)), blockRows: 20);

        Assert.Contains(rig.Statuses, status => status.Level == StatusLevel.Fault && status.What.Contains("out of order", StringComparison.Ordinal));
        Assert.Equal(500 * 8 / 2, rig.Readings.Count(reading => reading.Patch == "patch-1"));
        Assert.True(rig.Readings.Where(reading => reading.Patch == "patch-0").All(reading => reading.At.Received <= 2000));
    }

    [Fact]
    public void A_decimated_row_carries_the_instant_of_the_last_row_in_it()
    {
        var setup = Rig.Setup() with { Conditioners = [() => new EveryOther()] };

        var rig = Rig.Play(setup, new FakeFeed(setup.Format, Rig.Rows(setup, seconds: 6)), blockRows: 7);

        Assert.NotEmpty(rig.Readings);
        Assert.All(rig.Readings, reading => Assert.Equal(1, reading.At.Index % 2));
        Assert.NotEmpty(rig.Decisions);
    }

    [Theory]
    [InlineData(4, 250)]
    [InlineData(16, 62.5)]
    public void At_an_analysis_rate_frames_keep_their_distance_and_events_their_duration(double everyMs, double framesPerSecond)
    {
        var plain = Rig.Setup();
        var rows = Rig.Rows(plain, seconds: 12);
        var wave = plain.Tracks[0].Waves[0] with { MakeWave = () => new PlanarEstimator(new PlanarOptions(everyMs)) };
        plain = plain with { Tracks = [plain.Tracks[0] with { Waves = [wave] }] };
        var halved = plain with { Conditioners = [() => new Decimator(250)] };

        var whole = Rig.Play(plain, new FakeFeed(plain.Format, rows), blockRows: 20);
        var rig = Rig.Play(halved, new FakeFeed(halved.Format, rows), blockRows: 20);
        var inOtherBlocks = Rig.Play(halved, new FakeFeed(halved.Format, rows), blockRows: 7);

        Assert.InRange(rig.Readings.Count, (12 * framesPerSecond) - 1, 12 * framesPerSecond);
        Assert.Equal(rig.Tables(), inOtherBlocks.Tables());
        var (expected, events) = (Ended(whole), Ended(rig));
        Assert.NotEmpty(events);
        Assert.Equal(expected.Count, events.Count);
        for (var i = 0; i < events.Count; i++)
        {
            Assert.InRange(events[i].Onset.Index - expected[i].Onset.Index, -15, 15);      // 30 ms; rows of the stream
            Assert.InRange(Length(events[i]) - Length(expected[i]), -20, 20);
        }
    }

    [Fact]
    public void A_limit_of_rows_ends_the_run_at_that_row_whatever_the_block_size()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 8);

        var inSmall = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 3, rowLimit: 2501);
        var inLarge = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 1000, rowLimit: 2501);

        Assert.Equal(inSmall.Tables(), inLarge.Tables());
        Assert.True(inLarge.Readings.Max(reading => reading.At.Received) <= 2500);
    }

    [Theory]
    [InlineData(long.MaxValue)]
    [InlineData(2501)]
    public void A_block_is_told_before_what_was_read_from_it(long rowLimit)
    {
        var setup = Rig.Setup();

        var rig = Rig.Play(setup, new FakeFeed(setup.Format, Rig.Rows(setup, seconds: 8)), blockRows: 4000, rowLimit: rowLimit);

        Assert.NotEmpty(rig.Events);
        Assert.Equal(0, rig.ToldBeforeFirstBlock);
    }

    [Fact]
    public void A_hold_that_a_restart_ends_has_its_verdict_though_the_row_of_the_restart_was_swallowed()
    {
        var setup = Rig.Setup() with { Conditioners = [() => new EveryOther()] };
        var rows = Rig.Rows(setup, seconds: 8);
        var hold = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 20).Decisions.First(decision => decision.Kind == DecisionKind.Hold);
        var feed = new FakeFeed(setup.Format, rows).RestartBefore((int)hold.At.Received + 1);

        var rig = Rig.Play(setup, feed, blockRows: 1);

        Assert.Contains(rig.Decisions, decision => decision.EventNumber == hold.EventNumber && decision.Kind == DecisionKind.Hold);
        Assert.Equal(rig.Decisions.Select(decision => decision.Number).Order(), rig.Verdicts.Select(verdict => verdict.Decision.Number).Order());
    }

    [Fact]
    public void A_wave_estimator_that_fails_decides_no_more_in_the_very_row()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 12);
        var acts = Rig.Play(setup, new FakeFeed(setup.Format, rows), blockRows: 20).Decisions.Where(decision => decision.Kind != DecisionKind.Hold).ToList();
        var fails = acts[1].At.Index + 10;   // a frame in which the second event still passes, and in which the rest after the first is over
        var track = setup.Tracks[0];
        var broken = setup with
        {
            Tracks = [track with { Waves = [track.Waves[0] with { MakeWave = () => new FailingWave(fails) }] }],
            Rules = [setup.Rules[0] with { RestMs = (fails - acts[0].At.Index) * 2 }],
        };

        var rig = Rig.Play(broken, new FakeFeed(setup.Format, rows), blockRows: 20);

        Assert.Contains(rig.Statuses, status => status.What.Contains("out of order", StringComparison.Ordinal));
        Assert.Equal([acts[0].At], rig.Decisions.Where(decision => decision.Kind != DecisionKind.Hold).Select(decision => decision.At));
        Assert.Contains(rig.Decisions, decision => decision.EventNumber == acts[1].EventNumber && decision.Failed == Condition.Rest);
    }

    [Fact]
    public void A_fault_that_anyone_posts_disarms_the_run()
    {
        var setup = Rig.Setup();
        var fault = new Status(StatusLevel.Fault, "recorder", "a table has a hole", "", 0);

        var rig = Rig.Play(setup, new FakeFeed(setup.Format, Rig.Rows(setup, seconds: 8)), blockRows: 20, posted: fault);

        var acted = rig.Verdicts.Where(verdict => verdict.Decision.Kind != DecisionKind.Hold).ToList();
        Assert.NotEmpty(acted);
        Assert.All(acted, verdict => Assert.Equal(OutcomeKind.NotArmed, verdict.Outcome.Kind));
    }

    private static long Length(in WaveEvent wave) => wave.Last.Index - wave.Onset.Index;

    private static List<WaveEvent> Ended(Rig rig) => [.. rig.Events.Where(wave => wave.State == WaveEventState.Quiet)];

    private static void Step(DecisionCore core, double[][] rows, int i)
    {
        var now = new RowInstant(i, i, i / 500.0);
        if (core.StepPhase(now, rows[i]))
        {
            core.Read(now);
            core.Decide(now);
        }

        core.Forget();
    }

    private sealed class FailingPhase(int afterRows) : IPhaseEstimator
    {
        private int _rows;

        public void Prepare(StreamFormat format, Band band, Calibration calibration)
        {
        }

        public void Step(ReadOnlySpan<double> row, Phasors now)
        {
            if (++_rows > afterRows) throw new InvalidOperationException("out of order");
        }

        public void Predict(int horizonSamples, Phasors then)
        {
        }

        public void Reset() => _rows = 0;
    }

    private sealed class FailingWave(long index) : IWaveEstimator
    {
        private readonly PlanarEstimator _planar = new();

        public int Prepare(StreamFormat format, Band band, Layout layout, Calibration calibration) =>
            _planar.Prepare(format, band, layout, calibration);

        public void Read(Phasors now, ref Reading reading)
        {
            if (now.At.Index >= index) throw new InvalidOperationException("out of order");
            _planar.Read(now, ref reading);
        }

        public void Reset() => _planar.Reset();
    }

    private sealed class EveryOther : IConditioner
    {
        private bool _isSecond;

        public StreamFormat Prepare(StreamFormat input) => input.AtRate(input.NominalRateHz / 2);

        public bool Step(ReadOnlySpan<double> row, Span<double> conditioned)
        {
            _isSecond = !_isSecond;
            if (_isSecond) return false;
            row.CopyTo(conditioned);
            return true;
        }

        public void Reset() => _isSecond = false;

        public double DelaySeconds(double frequencyHz) => 0;
    }
}
