using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class GateFaultTests
{
    private static readonly CancellationToken Stop = TestContext.Current.CancellationToken;

    [Fact]
    public void An_output_that_throws_is_faulty_and_the_run_is_disarmed()
    {
        using var bench = new GateBench().Armed();
        bench.A.Throws = _ => true;
        _ = bench.Commit(100.1);
        _ = bench.Commit(100.2, output: 1);

        bench.StepAt(100.1);

        var refused = bench.Take();
        Assert.Equal((OutcomeKind.RefusedByOutput, 100.1), (refused.Kind, refused.Stages.SentSeconds));
        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        Assert.Contains("'a' failed", bench.Gate.DisarmReason, StringComparison.Ordinal);
        bench.A.Disposed.Wait(Stop);
        Assert.Equal((1, 1), (bench.A.QuietCount, bench.A.DisposeCount));
        Assert.Equal(0, bench.B.DisposeCount);
    }

    [Fact]
    public void A_fault_is_told_loudly()
    {
        using var bench = new GateBench().Armed();
        bench.A.Throws = _ => true;

        _ = bench.Round(100.1);

        Assert.True(bench.Gate.TryTakeNotice(out var fault));
        Assert.Equal((StatusLevel.Fault, "a", "it refused a pulse: the line is cut", 100.1), (fault.Level, fault.Where, fault.What, fault.AtSeconds));
        Assert.True(bench.Gate.TryTakeNotice(out var disarmed));
        Assert.Equal((StatusLevel.Warning, "gate"), (disarmed.Level, disarmed.Where));
    }

    [Fact]
    public void A_faulty_output_refuses_what_follows_and_keeps_the_run_from_arming()
    {
        using var bench = new GateBench().Armed();
        bench.A.Throws = _ => true;
        _ = bench.Round(100.1);

        _ = bench.Commit(100.2);

        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Take().Kind);
        Assert.Equal("output 'a' is faulty", Assert.Throws<RefusedException>(bench.Gate.Arm).What);
        Assert.Equal("output 'a' is faulty", Assert.Throws<RefusedException>(bench.Gate.Rehearse).What);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void An_output_that_blocks_is_declared_faulty_after_its_patience_and_freed_from_outside(bool quietFrees)
    {
        using var bench = new GateBench(patienceMs: 1000);
        bench.A.Blocks = _ => true;
        bench.A.QuietFrees = quietFrees;
        bench.Gate.Open();
        bench.Gate.Arm();
        var number = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        bench.A.Blocked.Wait(Stop);

        bench.Clock.MoveTo(101.0);
        bench.Gate.Watch(101.0);
        Assert.Equal(GateState.Armed, bench.Gate.State);
        Assert.False(bench.Gate.TryTake(out _));
        bench.Clock.MoveTo(101.2);
        bench.Gate.Watch(101.2);

        var outcome = bench.Take();
        Assert.Equal((number, OutcomeKind.RefusedByOutput, 100.1), (outcome.Decision, outcome.Kind, outcome.Stages.SentSeconds));
        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        bench.A.Disposed.Wait(Stop);
        Assert.Equal(1, bench.A.QuietCount);
        _ = bench.Commit(101.3);
        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Take().Kind);
        Assert.False(bench.Gate.TryTake(out _));
    }

    [Fact]
    public void An_output_that_blocks_costs_itself_only()
    {
        using var bench = new GateBench();
        bench.A.Blocks = _ => true;
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        bench.A.Blocked.Wait(Stop);

        for (var i = 1; i <= 5; i++)
        {
            _ = bench.Commit(100.1, output: 1);
            Outcome outcome;
            while (!bench.Gate.TryTake(out outcome)) _ = Thread.Yield();
            Assert.Equal(OutcomeKind.Sent, outcome.Kind);
        }
    }

    [Fact]
    public void A_blocked_output_is_busy_until_its_patience_is_over()
    {
        using var bench = new GateBench();
        bench.A.Blocks = _ => true;
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        bench.A.Blocked.Wait(Stop);

        _ = bench.Commit(100.2);

        Assert.Equal(OutcomeKind.OutputBusy, bench.Take().Kind);
    }

    [Fact]
    public void Disarming_while_an_output_is_stuck_closes_it_and_returns()
    {
        using var bench = new GateBench(patienceMs: 1);   // real milliseconds: the virtual clock stands still
        bench.A.Blocks = _ => true;
        bench.A.QuietFrees = false;
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        bench.A.Blocked.Wait(Stop);

        bench.Gate.Disarm("the operator pressed Esc");

        Assert.True(bench.A.IsDisposed);
        Assert.Equal("the operator pressed Esc", bench.Gate.DisarmReason);
        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Take().Kind);
    }

    [Fact]
    public void An_output_that_took_too_long_and_came_back_has_sent_and_is_faulty()
    {
        using var bench = new GateBench(patienceMs: 1000).Armed();
        bench.A.OnSend = _ => bench.Clock.MoveTo(102);

        Assert.Equal(OutcomeKind.Sent, bench.Round(100.5));

        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        _ = bench.Commit(103);
        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Take().Kind);
    }

    [Fact]
    public void An_output_may_disarm_from_inside_its_send()
    {
        using var bench = new GateBench().Armed();
        bench.A.OnSend = _ => bench.Gate.Disarm("the external stop was pressed");

        Assert.Equal(OutcomeKind.Sent, bench.Round(100.5));

        Assert.Equal("the external stop was pressed", bench.Gate.DisarmReason);
        Assert.Equal(0, bench.A.DisposeCount);
    }
}
