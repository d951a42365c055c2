using System.Collections.Concurrent;
using FsCheck.Xunit;
using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

/// <summary>Real threads: a decision thread, an operator and the senders, as fast as they can.</summary>
public sealed class GateThreadTests
{
    private static readonly TimeSpan Long = TimeSpan.FromMinutes(1);   // a bound for a broken gate, never waited for

    [Fact]
    public void No_send_starts_after_disarming_has_returned()
    {
        // The clock gives the processor away whenever a sender reads it: between being let through and sending, too.
        using var bench = new GateBench(patienceMs: 60_000, seenAs: real => new ScriptedClock(real) { OnRead = () => _ = Thread.Yield() });
        var mustNotSend = 0;
        var wrong = 0;
        void Check(Pulse pulse)
        {
            if (Volatile.Read(ref mustNotSend) == 1) _ = Interlocked.Increment(ref wrong);
        }

        bench.A.OnSend = Check;
        bench.B.OnSend = Check;
        bench.Gate.Open();
        var stop = false;
        var decisions = new Thread(() =>
        {
            while (!Volatile.Read(ref stop))
            {
                _ = bench.Commit(100, output: 0);
                _ = bench.Commit(100, output: 1);
                while (bench.Gate.TryTake(out _))
                {
                }
            }
        });
        decisions.Start();

        for (var round = 0; round < 3000; round++)
        {
            var before = bench.A.SentCount + bench.B.SentCount;
            Volatile.Write(ref mustNotSend, 0);
            bench.Gate.Arm();
            if (round % 4 == 0)
            {
                while (bench.A.SentCount + bench.B.SentCount == before) _ = Thread.Yield();
            }
            else
            {
                Thread.SpinWait(round % 500);
            }

            bench.Gate.Disarm("the operator pressed Esc");
            Volatile.Write(ref mustNotSend, 1);
            Thread.SpinWait(round % 300);
        }

        Volatile.Write(ref stop, true);
        decisions.Join();
        Assert.Equal(0, wrong);
        Assert.True(bench.A.SentCount + bench.B.SentCount >= 750);
    }

    [Fact]
    public void Stepping_the_clock_from_due_to_due_sends_each_pulse_at_its_instant()
    {
        using var bench = new GateBench();
        bench.Gate.Open();
        bench.Gate.Arm();
        var sent = 0;

        for (var block = 0; block < 300; block++)
        {
            var blockEnd = 100 + ((block + 1) * 0.032);
            _ = bench.Commit(blockEnd + (block % 7 * 0.005), output: block % 2);
            while (bench.Gate.NextDueSeconds <= blockEnd + 0.032)
            {
                bench.Clock.MoveTo(bench.Gate.NextDueSeconds);
                Assert.True(bench.Gate.AwaitSettled(Long));
            }

            bench.Clock.MoveTo(blockEnd);
            while (bench.Gate.TryTake(out var outcome))
            {
                Assert.Equal(OutcomeKind.Sent, outcome.Kind);
                Assert.Equal(outcome.Stages.DueSeconds, outcome.Stages.SentSeconds);
                sent++;
            }
        }

        Assert.Equal(300, sent);
    }

    [Fact]
    public void Settling_is_not_waited_for_longer_than_asked()
    {
        using var bench = new GateBench();
        bench.A.Blocks = _ => true;
        bench.Gate.Open();
        bench.Gate.Arm();
        Assert.True(bench.Gate.AwaitSettled(TimeSpan.Zero));
        _ = bench.Commit(100.1);
        Assert.True(bench.Gate.AwaitSettled(TimeSpan.Zero));   // not due yet

        bench.Clock.MoveTo(100.1);

        Assert.False(bench.Gate.AwaitSettled(TimeSpan.FromMilliseconds(1)));
    }

    [Property(Replay = "2026,1201", MaxTest = 150)]
    public void Whatever_happens_every_pulse_ends_once_and_none_is_sent_that_must_not(byte[] decisionScript, byte[] operatorScript)
    {
        using var scene = new GateScene();
        var operatorThread = new Thread(() => scene.Operate(operatorScript));
        operatorThread.Start();
        scene.Decide(decisionScript);
        while (operatorThread.IsAlive)
        {
            scene.Pass(seconds: 2 * GateScene.PatienceSeconds);   // frees what blocks, so that the operator's disarming returns
            _ = Thread.Yield();
        }

        operatorThread.Join();
        scene.End();

        Assert.Empty(scene.Wrong);
        Assert.Equal(scene.Committed.Order(), scene.Ended.Order());
        foreach (var output in scene.Outputs) Assert.Equal((1, 1), (output.QuietCount, output.DisposeCount));
    }

    /// <summary>A gate, a dummy and an ordinary output that check every send, and scripts for the two threads.</summary>
    private sealed class GateScene : IDisposable
    {
        public const double PatienceSeconds = 5;
        private readonly GateBench _bench = new(patienceMs: PatienceSeconds * 1000, isDummy: true);
        private int _mustNotSend = 1;

        public GateScene()
        {
            Outputs = [_bench.A, _bench.B];
            foreach (var output in Outputs)
            {
                output.Throws = pulse => pulse.Code % 16 == 1;
                output.Blocks = pulse => pulse.Code % 16 == 2;
                output.OnSend = pulse => Check(output, pulse);
            }

            _bench.Gate.Open();
        }

        public FakeOutput[] Outputs { get; }

        public ConcurrentQueue<string> Wrong { get; } = [];

        public List<(long Decision, string Output)> Committed { get; } = [];

        public List<(long Decision, string Output)> Ended { get; } = [];

        public void Decide(byte[] script)
        {
            foreach (var step in script)
            {
                if (step < 150) Commit(step);
                else if (step < 220) Pass((step - 150) * 0.0005);
                else if (step < 230) Pass(2 * PatienceSeconds);
                else _ = Thread.Yield();
            }
        }

        public void Operate(byte[] script)
        {
            foreach (var step in script)
            {
                if (step < 100)
                {
                    Volatile.Write(ref _mustNotSend, 0);
                    Try(step % 3 == 0 ? _bench.Gate.Rehearse : _bench.Gate.Arm);
                }
                else if (step < 180)
                {
                    _bench.Gate.Disarm("the operator pressed Esc");
                    Volatile.Write(ref _mustNotSend, 1);
                }
                else
                {
                    Thread.SpinWait(step);
                }
            }
        }

        public void Pass(double seconds)
        {
            _bench.Clock.MoveTo(_bench.Clock.NowSeconds + seconds);
            _bench.Gate.Watch(_bench.Clock.NowSeconds);
            TakeAll();
        }

        public void End()
        {
            _bench.Dispose();
            TakeAll();
        }

        public void Dispose() => _bench.Dispose();

        private void Commit(byte step)
        {
            var output = step % 2;
            var due = _bench.Clock.NowSeconds + ((step % 5) - 1) * 0.002;
            var number = _bench.Commit(due, step % 7 == 0 ? DecisionKind.Sham : DecisionKind.Pulse, output, step / 2);
            Committed.Add((number, output == 0 ? "a" : "b"));
        }

        private void TakeAll()
        {
            while (_bench.Gate.TryTake(out var outcome)) Ended.Add((outcome.Decision, outcome.Output));
        }

        private void Check(FakeOutput output, Pulse pulse)
        {
            if (output.IsDisposed) return;   // it sends nothing any more
            if (Volatile.Read(ref _mustNotSend) == 1) Wrong.Enqueue($"{pulse.Decision} started after disarming had returned");
            if (_bench.Clock.NowSeconds < pulse.DueSeconds) Wrong.Enqueue($"{pulse.Decision} started early");
        }

        private static void Try(Action act)
        {
            try
            {
                act();
            }
            catch (RefusedException)
            {
                // An output has failed, or the gate was disarmed at the same time: the operator tries on.
            }
        }
    }
}
