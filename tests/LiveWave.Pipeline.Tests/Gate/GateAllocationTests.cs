using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class GateAllocationTests
{
    [Theory]
    [InlineData(DecisionKind.Pulse)]
    [InlineData(DecisionKind.Sham)]
    public void Nothing_is_allocated_from_commit_to_outcome(DecisionKind kind)
    {
        using var bench = MakeQuiet();
        for (var i = 0; i < 200; i++) Turn(bench, kind);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 200; i++) Turn(bench, kind);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
        Assert.Equal(kind == DecisionKind.Pulse ? 400 : 0, bench.Gate.Count(OutcomeKind.Sent));
        Assert.Equal(400, bench.Gate.Count(OutcomeKind.OutputBusy));
    }

    private static GateBench MakeQuiet() =>
        new GateBench(new GateLimits { PulsesPerMinute = 100_000, PulsesPerSession = 1000, ShortestIntervalMs = 1, OldestDataMs = 500 }, recorded: false).Armed();

    private static void Turn(GateBench bench, DecisionKind kind)
    {
        var due = bench.Clock.NowSeconds + 0.01;
        _ = bench.Commit(due, kind);
        _ = bench.Commit(due, kind);   // busy
        _ = bench.Gate.NextDueSeconds;
        bench.Clock.MoveTo(due);
        bench.Gate.Watch(due);
        _ = bench.Gate.Lane(0).RunOnce();
        while (bench.Gate.TryTake(out _))
        {
        }

        _ = bench.Gate.TryTakeNotice(out _);
        _ = bench.Gate.AwaitSettled(TimeSpan.Zero);
    }
}
