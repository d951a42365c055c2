using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Pipeline;
using LiveWave.Testing;

namespace LiveWave.Display.Tests;

/// <summary>Twelve seconds of synthetic waves on 4 × 5 electrodes through a real loop, in virtual time, for a view to look at.</summary>
internal sealed class SmallRun : IDisposable
{
    private const double Seconds = 12;
    private readonly VirtualClock _clock = new();
    private readonly PulseGate _gate;
    private readonly PhaseSnapshot[] _phases = [new(20)];
    private readonly RunSetup _setup = MakeSetup();

    public SmallRun()
    {
        var board = new StatusBoard(_clock);
        Surface = new RunSurface(board);
        Surface.Decisions.Subscribe(decision => Decisions.Add(decision));
        _gate = new PulseGate([new GateOutput("stimulator", new NoOutput())], _clock);
        _gate.Open();
        _gate.Rehearse();
        Block = new SampleBlock(_setup.Format, 20);
        Loop = new StreamLoop(_setup, new RunParts
        {
            Feed = new SteppedFeed(new FakeFeed(_setup.Format, Rows()), _clock, _gate),
            Clock = _clock,
            Stopwatch = new VirtualClock(),
            Gate = _gate,
            Surface = Surface,
            Board = board,
            Ledger = Ledger,
            Watched = _phases,
            BlockRows = 20,
        });
    }

    public RunSurface Surface { get; }

    public StreamLoop Loop { get; }

    public SampleBlock Block { get; }

    public LatencyLedger Ledger { get; } = new(new BudgetLimits());

    public List<Decision> Decisions { get; } = [];

    public TerminalView View(ITerminal terminal) => new(
        Surface,
        new ViewParts
        {
            Setup = _setup,
            Loop = Loop,
            Ledger = Ledger,
            Limits = new BudgetLimits(),
            Gate = _gate,
            Phases = _phases,
            Calibration = "not calibrated",
        },
        terminal);

    public void Dispose()
    {
        _clock.Close();
        _gate.Dispose();
    }

    private static RunSetup MakeSetup()
    {
        var format = new StreamFormat("array", 500, WireFormat.Float32, [.. Enumerable.Range(0, 20).Select(i => new ChannelFormat($"e{i}", "microvolts"))]);
        var layout = new Layout([.. Enumerable.Range(0, 20).Select(i => new Electrode($"e{i}", 0.4 * (i % 5), 0.4 * (i / 5)))]);
        var settings = new EventTable { Enter = double.NaN, MinimumMs = 60, StabilityMs = 60, StabilityDegrees = 25, GapMs = 20, RefractoryMs = 100 };
        return new RunSetup
        {
            Format = format,
            Patches = [new PatchSetup("patch", [.. Enumerable.Range(0, 20)], layout)],
            Tracks =
            [
                new PhaseTrackSetup(
                    0,
                    new Band("beta", 14, 22, []),
                    Calibration.None("patch", "beta"),
                    () => new BandpassQuadratureEstimator(order: 2),
                    [new WaveTrackSetup("planar", () => new PlanarEstimator(), settings)]),
            ],
            Rules =
            [
                new RuleSetup { Name = "towards", Track = 0, Kind = WaveKind.Planar, DirectionDegrees = 135, ToleranceDegrees = 30, LeadMs = 20, RestMs = 300, Outputs = [0] },
            ],
            SessionId = "test",
        };
    }

    private double[][] Rows()
    {
        var count = (int)(Seconds * _setup.Format.NominalRateHz);
        var block = new SampleBlock(_setup.Format, count);
        using var waves = new WarmupFeed(_setup);
        _ = waves.Pull(block, TimeSpan.Zero);
        return [.. Enumerable.Range(0, count).Select(row => block.Row(row).ToArray())];
    }
}
