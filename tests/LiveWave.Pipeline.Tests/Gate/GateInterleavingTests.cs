using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

/// <summary>Disarming at every step of the sender's last instant, put there by a clock that acts when the sender reads it.</summary>
public sealed class GateInterleavingTests
{
    // How often the sender reads the clock until it is inside the driver: announcing itself, looking whether the instant has
    // come, asking the tally, noting when it sent.
    private const int AfterClaim = 2;
    private const int LastRead = 4;

    [Theory]
    [InlineData(1)]
    [InlineData(AfterClaim)]
    public void A_disarming_before_the_last_questions_is_obeyed(int read)
    {
        ScriptedClock? clock = null;
        using var bench = new GateBench(seenAs: real => clock = new ScriptedClock(real)).Armed();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        AtRead(clock!, read, () => bench.Gate.DisarmWithoutWaiting("a gap"));

        bench.Gate.Lane(0).LastInstant();

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Empty(bench.A.Sent);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(AfterClaim)]
    [InlineData(3)]
    [InlineData(LastRead)]
    public void Disarming_returns_only_when_no_send_can_start_any_more(int read)
    {
        ScriptedClock? clock = null;
        using var bench = new GateBench(patienceMs: 60_000, seenAs: real => clock = new ScriptedClock(real)).Armed();
        var hasReturned = false;
        var operatorThread = new Thread(() =>
        {
            bench.Gate.Disarm("the operator pressed Esc");
            Volatile.Write(ref hasReturned, true);
        });
        var startedAfter = false;
        bench.A.OnSend = _ => startedAfter = Volatile.Read(ref hasReturned);
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        AtRead(clock!, read, () =>
        {
            operatorThread.Start();
            while (bench.Gate.State != GateState.Disarmed) _ = Thread.Yield();
            for (var i = 0; i < 1000 && !Volatile.Read(ref hasReturned); i++) _ = Thread.Yield();   // time enough to return wrongly
        });

        bench.Gate.Lane(0).LastInstant();
        operatorThread.Join();

        Assert.False(startedAfter);
        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        Assert.Equal(read > AfterClaim ? OutcomeKind.Sent : OutcomeKind.Cancelled, bench.Take().Kind);
    }

    [Fact]
    public void A_pulse_that_was_cancelled_and_replaced_while_the_sender_woke_up_is_not_sent_early()
    {
        ScriptedClock? clock = null;
        using var bench = new GateBench(seenAs: real => clock = new ScriptedClock(real)).Armed();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        AtRead(clock!, 1, () =>
        {
            bench.Gate.Disarm("a gap");
            bench.Gate.Arm();
            _ = bench.Commit(100.2);   // moves the cancelled outcome out of the slot
        });

        bench.Gate.Lane(0).LastInstant();

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Empty(bench.A.Sent);
        bench.StepAt(100.2);
        Assert.Equal(OutcomeKind.Sent, bench.Take().Kind);
    }

    [Fact]
    public void Disarming_and_arming_again_while_the_sender_asks_does_not_revive_a_pulse()
    {
        ScriptedClock? clock = null;
        using var bench = new GateBench(seenAs: real => clock = new ScriptedClock(real)).Armed();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        AtRead(clock!, AfterClaim, () =>
        {
            bench.Gate.DisarmWithoutWaiting("a gap");
            bench.Gate.Arm();
        });

        bench.Gate.Lane(0).LastInstant();

        Assert.Equal(OutcomeKind.Cancelled, bench.Take().Kind);
        Assert.Empty(bench.A.Sent);
    }

    [Theory]
    [InlineData(1, OutcomeKind.Cancelled)]
    [InlineData(AfterClaim, OutcomeKind.Cancelled)]
    [InlineData(LastRead, OutcomeKind.RefusedByOutput)]   // it was kept until the output had been closed from outside
    public void An_end_at_any_step_leaves_one_outcome(int read, OutcomeKind expected)
    {
        ScriptedClock? clock = null;
        var bench = new GateBench(patienceMs: 5, seenAs: real => clock = new ScriptedClock(real)).Armed();
        _ = bench.Commit(100.1);
        bench.Clock.MoveTo(100.1);
        AtRead(clock!, read, () =>
        {
            if (read == LastRead) bench.Gate.End("Ctrl-C");
            else bench.Gate.DisarmWithoutWaiting("Ctrl-C");
        });

        bench.Gate.Lane(0).LastInstant();
        bench.Dispose();

        Assert.Equal(expected, bench.Take().Kind);
        Assert.False(bench.Gate.TryTake(out _));
        Assert.Empty(bench.A.Sent);
    }

    private static void AtRead(ScriptedClock clock, int read, Action act)
    {
        var count = 0;
        var sender = Environment.CurrentManagedThreadId;
        clock.OnRead = () =>
        {
            if (Environment.CurrentManagedThreadId != sender || ++count != read) return;
            act();
        };
    }
}
