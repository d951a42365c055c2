using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

public sealed class GateEndTests
{
    private static readonly CancellationToken Stop = TestContext.Current.CancellationToken;

    [Fact]
    public void The_end_cancels_what_waits_quiets_each_output_once_and_disposes_it()
    {
        var bench = new GateBench();
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        _ = bench.Commit(100.1, output: 1);

        bench.Clock.Close();
        bench.Gate.End("Ctrl-C");
        bench.Gate.Dispose();
        bench.Gate.End("again");

        Assert.Equal((OutcomeKind.Cancelled, OutcomeKind.Cancelled), (bench.Take().Kind, bench.Take().Kind));
        Assert.Equal((1, 1, 1), (bench.A.OpenCount, bench.A.QuietCount, bench.A.DisposeCount));
        Assert.Equal((1, 1, 1), (bench.B.OpenCount, bench.B.QuietCount, bench.B.DisposeCount));
        Assert.Equal((0, 0), (bench.A.SentCount, bench.B.SentCount));
        Assert.Equal((GateState.Disarmed, "Ctrl-C"), (bench.Gate.State, bench.Gate.DisarmReason));
    }

    [Fact]
    public void A_faulty_output_is_not_quieted_again_at_the_end()
    {
        var bench = new GateBench().Armed();
        bench.A.Throws = _ => true;
        _ = bench.Round(100.1);
        bench.A.Disposed.Wait(Stop);

        bench.Dispose();

        Assert.Equal((1, 1), (bench.A.QuietCount, bench.A.DisposeCount));
        Assert.Equal((1, 1), (bench.B.QuietCount, bench.B.DisposeCount));
    }

    [Fact]
    public void A_commit_after_the_end_is_cancelled_at_once()
    {
        var bench = new GateBench().Armed();
        bench.Dispose();

        _ = bench.Commit(100.1);

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
    }

    [Fact]
    public void A_pulse_that_is_stuck_at_the_end_is_freed_and_refused()
    {
        var bench = new GateBench(patienceMs: 20);
        bench.A.Blocks = _ => true;
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        bench.A.Blocked.Wait(Stop);

        bench.Dispose();

        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Take().Kind);
        Assert.False(bench.Gate.TryTake(out _));
        Assert.Equal((1, 1), (bench.A.QuietCount, bench.A.DisposeCount));
    }

    [Fact]
    public void The_end_lets_a_send_under_way_finish_before_it_brings_the_output_to_rest()
    {
        using var entered = new ManualResetEventSlim();
        using var goOn = new ManualResetEventSlim();
        var quieted = -1;
        var bench = new GateBench(patienceMs: 60_000);
        bench.A.OnSend = _ =>
        {
            entered.Set();
            goOn.Wait(Stop);
            quieted = bench.A.QuietCount;
        };
        bench.Gate.Open();
        bench.Gate.Arm();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        entered.Wait(Stop);

        var ending = new Thread(bench.Dispose);
        ending.Start();
        bench.B.Disposed.Wait(Stop);   // the other output is closed by now
        goOn.Set();
        ending.Join();

        Assert.Equal(0, quieted);
        Assert.Equal((1, 1, 1), (bench.A.SentCount, bench.A.QuietCount, bench.A.DisposeCount));
        Assert.Equal(OutcomeKind.Sent, bench.Take().Kind);
    }

    [Fact]
    public void An_output_that_will_not_come_to_rest_is_disposed_all_the_same_and_told()
    {
        var bench = new GateBench(patienceMs: 5).Armed();
        bench.A.QuietFrees = false;
        bench.A.QuietBlocks = true;

        bench.Dispose();

        Assert.Equal((1, 1), (bench.A.QuietCount, bench.A.DisposeCount));
        Assert.Contains(Notices(bench.Gate), notice => notice.Where == "a" && notice.What.Contains("did not come to rest", StringComparison.Ordinal));
    }

    [Fact]
    public void A_gate_of_which_an_output_did_not_open_ends_quietly()
    {
        var good = new FakeOutput();
        using var broken = new BrokenOutput();
        var gate = new PulseGate([new GateOutput("good", good), new GateOutput("broken", broken)], new VirtualClock(), new GateLimits(), mayBeArmed: true);

        Assert.Throws<RefusedException>(gate.Open);
        Assert.Throws<RefusedException>(gate.Arm);
        gate.Dispose();

        Assert.Equal((1, 1), (good.QuietCount, good.DisposeCount));
    }

    [Fact]
    public void A_gate_opens_once()
    {
        using var bench = new GateBench().Opened();

        Assert.Throws<InvalidOperationException>(bench.Gate.Open);
    }

    private static IEnumerable<Status> Notices(PulseGate gate)
    {
        while (gate.TryTakeNotice(out var notice)) yield return notice;
    }

    private sealed class BrokenOutput : IOutput
    {
        public void Open() => throw new RefusedException("there is no such port", "[[output]] broken", "look at the cable");

        public void Send(in Pulse pulse) => throw new InvalidOperationException("it was never open");

        public void Quiet()
        {
            // At rest.
        }

        public void Dispose()
        {
            // Nothing to free.
        }
    }
}
