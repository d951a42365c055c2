using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline.Tests;

/// <summary>A small run on synthetic rows: arrays of 4 × 5 electrodes, waves towards the rule and away from it.</summary>
internal sealed class Rig
{
    private readonly List<Decision> _decisions = [];
    private readonly List<WaveEvent> _events = [];
    private readonly List<Verdict> _verdicts = [];
    private readonly List<Reading> _readings = [];
    private readonly List<Status> _statuses = [];

    /// <summary>A setup with some arrays and bands; the rules watch the first array in each band.</summary>
    public static RunSetup Setup(int patches = 1, params (double LowHz, double HighHz)[] bands)
    {
        if (bands.Length == 0) bands = [(14, 22)];
        var format = new StreamFormat(
            "array", 500, WireFormat.Float32, [.. Enumerable.Range(0, 20 * patches).Select(i => new ChannelFormat($"e{i}", "microvolts"))]);
        return new RunSetup
        {
            Format = format,
            Patches = [.. Enumerable.Range(0, patches).Select(patch => Patch(patch, format))],
            Tracks = [.. from patch in Enumerable.Range(0, patches) from band in bands select Track(patch, band)],
            Rules = [.. bands.Select((_, band) => Rule(band))],
            Seed = 5,
            SessionId = "test",
            BlankAfterPulseMs = 4,
        };
    }

    /// <summary>Seconds of synthetic waves, row after row.</summary>
    public static double[][] Rows(RunSetup setup, double seconds)
    {
        var count = (int)(seconds * setup.Format.NominalRateHz);
        var block = new SampleBlock(setup.Format, count);
        using var waves = new WarmupFeed(setup);
        _ = waves.Pull(block, TimeSpan.Zero);
        return [.. Enumerable.Range(0, count).Select(row => block.Row(row).ToArray())];
    }

    public IReadOnlyList<Decision> Decisions => _decisions;

    public IReadOnlyList<WaveEvent> Events => _events;

    public IReadOnlyList<Verdict> Verdicts => _verdicts;

    public IReadOnlyList<Reading> Readings => _readings;

    public IReadOnlyList<Status> Statuses => _statuses;

    /// <summary>Readings and events that were told before the first block; −1: no block was told.</summary>
    public int ToldBeforeFirstBlock { get; private set; } = -1;

    /// <summary>Judges a feed to its end, as fast as possible, with the loop's own checks switched on.</summary>
    public static Rig Play(RunSetup setup, IFeed feed, int blockRows, Action<int, PulseGate>? meanwhile = null, IOutput? output = null, long rowLimit = long.MaxValue, Status? posted = null)
    {
        var rig = new Rig();
        var clock = new VirtualClock();
        var board = new StatusBoard(clock);
        if (posted is { } status) board.Post(status.Level, status.Where, status.What, status.Advice);
        var surface = new RunSurface(board);
        using var gate = new PulseGate([new GateOutput("stimulator", output ?? new NoOutput()) { IsDummy = output is not null }], clock);
        gate.Open();
        using var subscriptions = rig.Listen(surface);
        var loop = new StreamLoop(setup, new RunParts
        {
            Feed = new SteppedFeed(feed, clock, gate),
            Clock = clock,
            Stopwatch = new VirtualClock(),
            Gate = gate,
            Surface = surface,
            Board = board,
            Ledger = new LatencyLedger(new BudgetLimits()),
            BlockRows = blockRows,
            RowLimit = rowLimit,
            Checks = true,
        });
        for (var turn = 0; loop.RunOnce(); turn++) meanwhile?.Invoke(turn, gate);
        clock.Close();
        gate.End("the test is over");
        loop.DrainAll();
        return rig;
    }

    /// <summary>Decisions and events as the session's tables write them.</summary>
    public string Tables()
    {
        var folder = Directory.CreateTempSubdirectory("livewave-test-");
        try
        {
            using (var tables = new SessionTables(SessionFolder.Create(Path.Combine(folder.FullName, "session"))))
            {
                foreach (var wave in _events.Where(wave => wave.State == WaveEventState.Quiet)) tables.Add(wave, firstStampSeconds: 0);
                foreach (var decision in _decisions) tables.Add(decision);
            }

            return string.Concat(
                ((string[])["events.tsv", "decisions.tsv"]).Select(name => File.ReadAllText(Path.Combine(folder.FullName, "session", name))));
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }

    private static PatchSetup Patch(int number, StreamFormat format)
    {
        var channels = Enumerable.Range(20 * number, 20).ToArray();
        return new PatchSetup(
            $"patch-{number}",
            channels,
            new Layout([.. channels.Select((channel, i) => new Electrode(format.Channels[channel].Label, 0.4 * (i % 5), 0.4 * (i / 5)))]));
    }

    private static PhaseTrackSetup Track(int patch, (double LowHz, double HighHz) edges)
    {
        var band = new Band($"band-{edges.LowHz}", edges.LowHz, edges.HighHz, []);
        return new PhaseTrackSetup(
            patch,
            band,
            Calibration.None($"patch-{patch}", band.Name),
            () => new BandpassQuadratureEstimator(order: 2),
            [new WaveTrackSetup("planar", () => new PlanarEstimator(), EventSettings)]);
    }

    private static readonly EventTable EventSettings = new()
    {
        Enter = double.NaN,
        MinimumMs = 60,
        StabilityMs = 60,
        StabilityDegrees = 25,
        GapMs = 20,
        RefractoryMs = 100,
    };

    private static RuleSetup Rule(int track) => new()
    {
        Name = $"rule-{track}",
        Track = track,
        Kind = WaveKind.Planar,
        DirectionDegrees = 135,
        ToleranceDegrees = 30,
        StandardErrorDegrees = 20,
        LeadMs = 20,
        RestMs = 300,
        ShamFraction = 0.3,
        Code = 7 + track,
        Outputs = [0],
    };

    private System.Reactive.Disposables.CompositeDisposable Listen(RunSurface surface) => new(
        surface.Blocks.Subscribe(_ => ToldBeforeFirstBlock = ToldBeforeFirstBlock < 0 ? _readings.Count + _events.Count : ToldBeforeFirstBlock),
        surface.Decisions.Subscribe(_decisions.Add),
        surface.Events.Subscribe(_events.Add),
        surface.Verdicts.Subscribe(_verdicts.Add),
        surface.Readings.Subscribe(_readings.Add),
        surface.Status.Subscribe(_statuses.Add));
}
