using LiveWave.Abstractions;
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
