using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

public sealed class PulseGateTests
{
    [Fact]
    public void An_armed_gate_sends_at_the_due_instant_and_says_so()
    {
        using var bench = new GateBench().Armed();
        var number = bench.Commit(100.05, code: 3);

        bench.StepAt(100.05);

        var pulse = Assert.Single(bench.A.Sent);
        Assert.Equal((number, 100.05, 3, "towards-anterior", 7, false), (pulse.Decision, pulse.DueSeconds, pulse.Code, pulse.Rule, pulse.EventNumber, pulse.IsRehearsal));
        var outcome = bench.Take();
        Assert.Equal((number, "a", OutcomeKind.Sent), (outcome.Decision, outcome.Output, outcome.Kind));
        Assert.Equal(GateBench.Stages(99.99) with { DueSeconds = 100.05, SentSeconds = 100.05 }, outcome.Stages);
        Assert.Equal(1, bench.Gate.Count(OutcomeKind.Sent));
    }

    [Fact]
    public void A_gate_starts_disarmed_and_lets_nothing_out()
    {
        using var bench = new GateBench().Opened();

        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        Assert.Equal(OutcomeKind.NotArmed, bench.Round(100.1));
        Assert.Equal(OutcomeKind.NotArmed, bench.Round(100.2, DecisionKind.Sham));
        Assert.Empty(bench.A.Sent);
    }

    [Fact]
    public void Nothing_is_sent_before_its_instant()
    {
        using var bench = new GateBench().Armed();
        _ = bench.Commit(100.05);

        bench.StepAt(100.0499);

        Assert.Empty(bench.A.Sent);
        Assert.False(bench.Gate.TryTake(out _));
        bench.StepAt(100.05);
        Assert.Single(bench.A.Sent);
    }

    [Theory]
    [InlineData(0.0009, OutcomeKind.Sent)]
    [InlineData(0.0011, OutcomeKind.Late)]
    [InlineData(5.0, OutcomeKind.Late)]
    public void A_pulse_later_than_allowed_is_not_sent(double latenessSeconds, OutcomeKind expected)
    {
        using var bench = new GateBench().Armed();
        _ = bench.Commit(100.05);

        bench.StepAt(100.05 + latenessSeconds);

        var outcome = bench.Take();
        Assert.Equal(expected, outcome.Kind);
        Assert.Equal(expected == OutcomeKind.Sent ? 1 : 0, bench.A.SentCount);
        Assert.Equal(expected == OutcomeKind.Sent, double.IsFinite(outcome.Stages.SentSeconds));
    }

    [Fact]
    public void A_pulse_for_no_known_instant_is_late()
    {
        using var bench = new GateBench().Armed();

        _ = bench.Commit(double.NaN);
        _ = bench.Commit(double.PositiveInfinity);

        Assert.Equal(OutcomeKind.Late, bench.Take().Kind);
        Assert.Equal(OutcomeKind.Late, bench.Take().Kind);
    }

    [Fact]
    public void An_output_that_still_has_a_pulse_is_busy_and_keeps_it()
    {
        using var bench = new GateBench().Armed();
        var first = bench.Commit(100.05);
        var second = bench.Commit(100.06);

        var busy = bench.Take();
        bench.StepAt(100.05);

        Assert.Equal((second, OutcomeKind.OutputBusy), (busy.Decision, busy.Kind));
        var sent = bench.Take();
        Assert.Equal((first, OutcomeKind.Sent), (sent.Decision, sent.Kind));
    }

    [Fact]
    public void An_outcome_that_was_not_taken_yet_does_not_keep_the_output_busy()
    {
        using var bench = new GateBench().Armed();
        for (var i = 1; i <= 1000; i++)
        {
            _ = bench.Commit(100 + i);
            bench.StepAt(100 + i);
        }

        var outcomes = Enumerable.Range(0, 1000).Select(_ => bench.Take()).ToList();

        Assert.Equal(Enumerable.Range(1, 1000).Select(i => (long)i), outcomes.Select(outcome => outcome.Decision));
        Assert.All(outcomes, outcome => Assert.Equal(OutcomeKind.Sent, outcome.Kind));
        Assert.False(bench.Gate.TryTake(out _));
        Assert.Equal(999, bench.Gate.LargestBacklog);
    }

    [Fact]
    public void A_sham_goes_the_whole_way_and_is_withheld_at_the_last_instant()
    {
        using var bench = new GateBench().Armed();
        _ = bench.Commit(100.05, DecisionKind.Sham);
        Assert.False(bench.Gate.TryTake(out _));

        bench.StepAt(100.05);

        var outcome = bench.Take();
        Assert.Equal((OutcomeKind.Withheld, 100.05), (outcome.Kind, outcome.Stages.SentSeconds));
        Assert.Empty(bench.A.Sent);
        Assert.Equal(0, bench.Gate.PulsesUsed);
    }

    [Fact]
    public void A_sham_that_would_have_been_late_or_busy_is_late_or_busy()
    {
        using var bench = new GateBench().Armed();
        _ = bench.Commit(100.05, DecisionKind.Sham);
        _ = bench.Commit(100.05, DecisionKind.Sham);

        bench.StepAt(101);

        Assert.Equal(OutcomeKind.OutputBusy, bench.Take().Kind);
        Assert.Equal(OutcomeKind.Late, bench.Take().Kind);
    }

    [Fact]
    public void A_rehearsed_pulse_is_not_sent()
    {
        using var bench = new GateBench(mayBeArmed: false).Opened();
        _ = bench.Commit(100.05);

        bench.StepAt(100.05);

        Assert.Equal(GateState.Rehearsing, bench.Gate.State);
        var outcome = bench.Take();
        Assert.Equal((OutcomeKind.Rehearsed, 100.05), (outcome.Kind, outcome.Stages.SentSeconds));
        Assert.Empty(bench.A.Sent);
    }

    [Fact]
    public void A_rehearsal_drives_a_dummy_with_marked_pulses_and_withholds_shams()
    {
        using var bench = new GateBench(mayBeArmed: false, isDummy: true).Opened();

        Assert.Equal(OutcomeKind.Rehearsed, bench.Round(100.1));
        Assert.Equal(OutcomeKind.Withheld, bench.Round(100.2, DecisionKind.Sham));

        Assert.True(Assert.Single(bench.A.Sent).IsRehearsal);
    }

    [Fact]
    public void A_disarmed_rehearsal_leaves_dummies_alone_until_it_rehearses_again()
    {
        using var bench = new GateBench(mayBeArmed: false, isDummy: true).Opened();
        bench.Gate.Disarm("a gap of 3 s");

        Assert.Equal(OutcomeKind.NotArmed, bench.Round(100.1));
        bench.Gate.Rehearse();
        Assert.Equal(OutcomeKind.Rehearsed, bench.Round(100.2));

        Assert.Single(bench.A.Sent);
    }

    [Fact]
    public void A_run_that_may_only_rehearse_opens_its_dummies_only_and_can_never_be_armed()
    {
        var lamp = new FakeOutput();
        var stimulator = new FakeOutput();
        using var gate = new PulseGate(
            [new GateOutput("lamp", lamp) { IsDummy = true }, new GateOutput("stimulator", stimulator)], new VirtualClock(), new GateLimits());
        gate.OpenOutputs();

        var refusal = Assert.Throws<RefusedException>(gate.Arm);
        gate.Dispose();

        Assert.Equal("this run can only rehearse", refusal.What);
        Assert.Equal((1, 1, 1), (lamp.OpenCount, lamp.QuietCount, lamp.DisposeCount));
        Assert.Equal((0, 0, 1), (stimulator.OpenCount, stimulator.QuietCount, stimulator.DisposeCount));
    }

    [Fact]
    public void Arming_needs_limits_and_open_outputs_and_a_run_that_goes_on()
    {
        using var limitless = new PulseGate([new GateOutput("a", new FakeOutput())], new VirtualClock(), limits: null, mayBeArmed: true);
        limitless.OpenOutputs();
        using var closed = new GateBench();
        using var ended = new GateBench().Opened();
        ended.Gate.Dispose();

        Assert.Equal("the sheet gives no limits", Assert.Throws<RefusedException>(limitless.Arm).What);
        Assert.Equal("the outputs are not open", Assert.Throws<RefusedException>(closed.Gate.Arm).What);
        Assert.Equal("the run is at its end", Assert.Throws<RefusedException>(ended.Gate.Arm).What);
        Assert.Equal("the run is at its end", Assert.Throws<RefusedException>(ended.Gate.Rehearse).What);
    }

    [Fact]
    public void Disarming_cancels_what_waits_and_keeps_the_first_reason()
    {
        using var bench = new GateBench().Armed();
        _ = bench.Commit(100.05);
        _ = bench.Commit(100.05, DecisionKind.Sham, output: 1);

        bench.Gate.Disarm("the operator pressed Esc");
        bench.Gate.Disarm("later");

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Equal("the operator pressed Esc", bench.Gate.DisarmReason);
        Assert.True(bench.Gate.TryTakeNotice(out var notice));
        Assert.Equal("disarmed: the operator pressed Esc", notice.What);
        Assert.False(bench.Gate.TryTakeNotice(out _));
        bench.StepAt(100.05);
        Assert.Empty(bench.A.Sent);
    }

    [Fact]
    public void Arming_gives_a_new_reason_its_chance()
    {
        using var bench = new GateBench().Armed();
        bench.Gate.Disarm("first");
        bench.Gate.Arm();
        Assert.Equal("", bench.Gate.DisarmReason);

        bench.Gate.Disarm("second");

        Assert.Equal("second", bench.Gate.DisarmReason);
    }

    [Fact]
    public void Arming_does_not_release_a_pulse_that_was_committed_before()
    {
        using var bench = new GateBench().Opened();
        _ = bench.Commit(100.05);
        bench.Gate.Arm();

        bench.StepAt(100.05);

        Assert.Equal(OutcomeKind.NotArmed, bench.Take().Kind);
        Assert.Empty(bench.A.Sent);
    }

    [Fact]
    public void Rehearsing_cancels_the_pulses_of_an_armed_run_and_counts_for_itself()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerSession = 200 }).Armed();
        Assert.Equal(OutcomeKind.Sent, bench.Round(100.1));
        _ = bench.Commit(100.2);

        bench.Gate.Rehearse();

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Equal(OutcomeKind.Rehearsed, bench.Round(100.3));
        Assert.Equal(OutcomeKind.Rehearsed, bench.Round(100.4));
        Assert.Equal((2, 200), (bench.Gate.PulsesUsed, bench.Gate.PulsesAllowed));
        bench.Gate.Arm();
        Assert.Equal(1, bench.Gate.PulsesUsed);
    }

    [Fact]
    public void A_hold_is_not_for_the_gate()
    {
        using var bench = new GateBench().Armed();

        Assert.Throws<ArgumentException>(() => bench.Commit(double.NaN, DecisionKind.Hold));
    }

    [Fact]
    public void The_next_due_instant_is_that_of_the_earliest_pending_pulse()
    {
        using var bench = new GateBench().Armed();
        Assert.Equal(double.PositiveInfinity, bench.Gate.NextDueSeconds);

        _ = bench.Commit(100.2);
        _ = bench.Commit(100.1, output: 1);

        Assert.Equal(100.1, bench.Gate.NextDueSeconds);
        bench.StepAt(100.1, output: 1);
        Assert.Equal(100.2, bench.Gate.NextDueSeconds);
    }

    [Fact]
    public void Nonsense_is_refused_when_the_gate_is_made()
    {
        var clock = new VirtualClock();
        PulseGate Make(double patienceMs = 100, double latenessMs = 1, string second = "b", GateLimits? limits = null) => new(
            [new GateOutput("a", new FakeOutput()) { PatienceMs = patienceMs }, new GateOutput(second, new FakeOutput())], clock, limits, false, latenessMs);

        Assert.Throws<ArgumentOutOfRangeException>(() => Make(patienceMs: 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(patienceMs: double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(latenessMs: -1));
        Assert.Throws<ArgumentException>(() => Make(second: "a"));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(limits: new GateLimits { PulsesPerMinute = -1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(limits: new GateLimits { PulsesPerSession = -1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(limits: new GateLimits { ShortestIntervalMs = double.NaN }));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(limits: new GateLimits { LongestRunMinutes = double.PositiveInfinity }));
        Assert.Throws<ArgumentOutOfRangeException>(() => Make(limits: new GateLimits { OldestDataMs = -1 }));
    }
}
