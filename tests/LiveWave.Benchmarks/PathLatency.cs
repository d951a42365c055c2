using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Benchmarks;

/// <summary>The question: after the warm-up, how long does the path compute from a block's arrival to the decision of its last row,
/// and is the first pulse as quick as the hundredth?</summary>
/// <remarks>Synthetic waves on the bundled layout with the bundled calibration, paced in real time by the real clock, judged by
/// the real loop, gate and sender. States collections, pauses and what other machines took from this one.</remarks>
internal sealed class PathLatency(RunSetup setup, double seconds)
{
    private const int Hundredth = 100;

    public void Run(int blockRows)
    {
        var stopwatch = new RealClock();
        var warmup = Warmup.Run(setup, stopwatch);
        var clock = new RealClock(nowIs: 0);
        var board = new StatusBoard(clock);
        var surface = new RunSurface(board);
        using var gate = new PulseGate([new GateOutput("stimulator", new NoOutput())], clock);
        gate.Open();
        var ledger = new LatencyLedger(new BudgetLimits());
        var pulses = new List<double>(10_000);
        using var listening = surface.Verdicts.Subscribe(verdict => Note(verdict, pulses));
        var loop = new StreamLoop(setup, new RunParts
        {
            Feed = new PacedFeed(new WarmupFeed(setup), clock),
            Clock = clock,
            Stopwatch = stopwatch,
            Gate = gate,
            Surface = surface,
            Board = board,
            Ledger = ledger,
            BlockRows = blockRows,
            RowLimit = (long)(seconds * setup.Format.NominalRateHz),
        });
        var host = HostLoad.Now();
        var collections = GC.CollectionCount(0);
        var pause = GC.GetTotalPauseDuration();
        using (var thread = new DecisionThread(loop, gate))
        {
            thread.Start();
            while (!thread.Wait(TimeSpan.FromSeconds(1)))
            {
            }
        }

        gate.End("the benchmark is over");
        loop.DrainAll();
        Print(blockRows, warmup, ledger, pulses, GC.CollectionCount(0) - collections, GC.GetTotalPauseDuration() - pause, HostLoad.Since(host));
    }

    private static void Note(Verdict verdict, List<double> pulses)
    {
        if (verdict.Decision.Kind == DecisionKind.Hold) return;
        pulses.Add((verdict.Outcome.Stages.DecidedSeconds - verdict.Outcome.Stages.ReceivedSeconds) * 1000);
    }

    private void Print(
        int blockRows, WarmupReport warmup, LatencyLedger ledger, List<double> pulses, int collections, TimeSpan pause, string host)
    {
        var blocks = ledger.Blocks;
        Console.WriteLine($"{setup.Format.ChannelCount} channels, {setup.Format.NominalRateHz} Hz, blocks of {blockRows}, {seconds} s in real time");
        Console.WriteLine($"  received to decided   p50 {blocks.PercentileMs(50):F3}  p99 {blocks.PercentileMs(99):F3}  p99.9 {blocks.PercentileMs(99.9):F3}  max {blocks.MaxMs:F3} ms  (n = {blocks.Count} blocks)");
        Console.WriteLine($"  goal: none above 1 ms: {(blocks.OverLimit == 0 ? "met" : $"missed, {blocks.OverLimit} above")}");
        if (pulses.Count >= Hundredth)
        {
            var excess = pulses[0] - pulses[Hundredth - 1];
            Console.WriteLine($"  first pulse {pulses[0]:F3} ms, hundredth {pulses[Hundredth - 1]:F3} ms after its block arrived; goal: no slower by more than 0.2 ms: {(excess <= 0.2 ? "met" : "missed")}");
        }
        else
        {
            Console.WriteLine($"  only {pulses.Count} pulses and shams: run longer to compare the first with the hundredth");
        }

        var late = ledger.Lateness;
        Console.WriteLine($"  due to sent           p50 {late.PercentileMs(50):F3}  p99 {late.PercentileMs(99):F3}  max {late.MaxMs:F3} ms  (n = {late.Count})");
        Console.WriteLine($"  {collections} collections, {pause.TotalMilliseconds:F1} ms stopped; the decision thread allocated {ledger.DecisionThreadBytes} bytes while judging");
        Console.WriteLine($"  warm-up {warmup.Pulses} pulses, {warmup.Shams} shams, {warmup.Holds} holds in {warmup.Seconds:F1} s; {host}");
    }
}
