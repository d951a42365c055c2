using System.Reactive.Linq;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Runs a clone of the run on synthetic rows before the first real block: compiles the path, and is the self-test.</summary>
/// <remarks>Without it the first decision that acts costs milliseconds, however long the chain has been running (measured). Every
/// kind of decision that the rules can take goes through the real gate and sender code into an output that discards.</remarks>
public static class Warmup
{
    /// <summary>Decisions of each kind that are enough.</summary>
    public const int Enough = 100;

    private const double CompileSeconds = 0.6;
    private const double TestSeconds = 0.5;
    private const double MostSeconds = 4.0;
    private const int BlockRows = 16;

    /// <summary>Warms up.</summary>
    /// <param name="setup">The run; its rules are judged without rest, and shams are drawn half of the time.</param>
    /// <param name="stopwatch">A real clock.</param>
    public static WarmupReport Run(RunSetup setup, IClock stopwatch)
    {
        ArgumentNullException.ThrowIfNull(setup);
        ArgumentNullException.ThrowIfNull(stopwatch);
        var clone = setup with
        {
            SessionId = "warm-up",
            Rules = [.. setup.Rules.Select(rule => rule with { RestMs = 0, ShamFraction = 0.5, Outputs = [0] })],
        };
        var started = stopwatch.NowSeconds;
        var taken = new int[3];
        var trouble = new List<string>();
        _ = Play(clone, stopwatch, taken, trouble, seconds => seconds > CompileSeconds);
        var blocks = Play(clone, stopwatch, taken, trouble, seconds => seconds > TestSeconds && (IsEnough(taken, clone) || seconds > MostSeconds));
        return new WarmupReport(
            taken[(int)DecisionKind.Pulse],
            taken[(int)DecisionKind.Sham],
            taken[(int)DecisionKind.Hold],
            stopwatch.NowSeconds - started,
            blocks.PercentileMs(99),
            BlockRows,
            blocks.Count,
            trouble.FirstOrDefault() ?? "");
    }

    private static StageHistogram Play(
        RunSetup clone, IClock stopwatch, int[] taken, List<string> trouble, Func<double, bool> isOver)
    {
        var started = stopwatch.NowSeconds;
        var clock = new VirtualClock();
        var board = new StatusBoard(clock);
        var surface = new RunSurface(board);
        using var counting = surface.Verdicts.Subscribe(verdict => taken[(int)verdict.Decision.Kind]++);
        using var listening = surface.Status
            .Where(status => status.Level == StatusLevel.Fault)
            .Subscribe(status => trouble.Add($"{status.Where}: {status.What}"));
        using var gate = new PulseGate([new GateOutput("warm-up", new NoOutput())], clock);
        gate.Open();
        using var feed = new SteppedFeed(new WarmupFeed(clone), clock, gate);
        var ledger = new LatencyLedger(new BudgetLimits());
        var loop = new StreamLoop(clone, new RunParts
        {
            Feed = feed,
            Clock = clock,
            Stopwatch = stopwatch,
            Gate = gate,
            Surface = surface,
            Board = board,
            Ledger = ledger,
            BlockRows = BlockRows,
        });
        while (!isOver(stopwatch.NowSeconds - started) && loop.RunOnce())
        {
        }

        loop.Finish(RunEnd.Stopped);
        clock.Close();
        return ledger.Blocks;
    }

    private static bool IsEnough(int[] taken, RunSetup clone) => clone.Rules.Count == 0 || taken.All(count => count >= Enough);
}
