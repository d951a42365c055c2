using System.Globalization;
using LiveWave.Abstractions;
using LiveWave.Display;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>Puts a rehearsal together by hand: reading this is reading the architecture.</summary>
/// <remarks>sheet, recording → patches and calibrations → setup → warm-up on a clone → feed at a pace, gate, surface → loop.</remarks>
internal sealed class WatchWiring : IDisposable
{
    // Between the clock's start and the first pull lie outputs to open and files to make: so long before the first row is due.
    private const double HeadStartSeconds = 0.5;

    // What computing and waking a sender take on a busy machine, ms.
    private const double LeastSpareMs = 3;

    private readonly SessionSheet _sheet;
    private readonly RecordingFeed _recording;

    private WatchWiring(SessionSheet sheet, RecordingFeed recording)
    {
        _sheet = sheet;
        _recording = recording;
    }

    /// <summary>Stamp of the first row.</summary>
    public required double FirstStampSeconds { get; init; }

    public required RunSetup Setup { get; init; }

    public required CalibrationChoice Calibrations { get; init; }

    public required WarmupReport Warmup { get; init; }

    public required IClock Clock { get; init; }

    public required PulseGate Gate { get; init; }

    public required RunSurface Surface { get; init; }

    public required StatusBoard Board { get; init; }

    public required LatencyLedger Ledger { get; init; }

    public required StreamLoop Loop { get; init; }

    /// <summary>Phasors for a view; empty where nobody looks.</summary>
    public required IReadOnlyList<PhaseSnapshot> Phases { get; init; }

    /// <summary>What waiting for an instant lacks on this machine; empty where it lacks nothing.</summary>
    public required string Waiting { get; init; }

    /// <summary>Which bits this machine computes.</summary>
    public string NumericsPrint { get; } = Dsp.NumericsPrint.Compute();

    /// <summary>What is worth knowing before the first block.</summary>
    public IReadOnlyList<Status> NotesFor(WatchOptions options) => [.. Calibrations.Notes, .. LeadNotes(options), .. WarmupNotes()];

    /// <summary>Makes everything; opens no output.</summary>
    public static WatchWiring Make(SessionSheet sheet, RecordingFeed recording, double firstStampSeconds, WatchOptions options)
    {
        var stopwatch = new RealClock();
        var catalog = BuiltInParts.Catalog();
        var patches = sheet.Patches.Select(patch => PatchReader.Read(sheet, patch, recording.Format)).ToList();
        var calibrations = CalibrationChoice.Make(sheet, patches, recording.Format);
        var sessionId = options.SessionId ?? NewSessionId(sheet);
        RunSetup SetupOn(IClock clock) => new RunSetupBuilder(sheet, recording.Format, catalog, clock).Build(patches, calibrations.Of, sessionId);
        var warmup = Pipeline.Warmup.Run(SetupOn(stopwatch), stopwatch);

        // Not before the warm-up, which takes seconds: rows would be due already, and their pulses late.
        IClock clock = options.IsRealClock ? new RealClock(firstStampSeconds - HeadStartSeconds) : new VirtualClock(firstStampSeconds);
        var setup = SetupOn(clock);
        var board = new StatusBoard(clock);
        var surface = new RunSurface(board);
        var gate = new PulseGate(Outputs(sheet, catalog, clock), clock, Limits(sheet));
        var ledger = new LatencyLedger(Budget(sheet));
        List<PhaseSnapshot> phases = options.HasView ? [.. setup.Tracks.Select(track => new PhaseSnapshot(setup.Patches[track.Patch].Channels.Count))] : [];
        var loop = new StreamLoop(setup, new RunParts
        {
            Feed = clock is VirtualClock steps ? new SteppedFeed(recording, steps, gate) : new PacedFeed(recording, clock),
            Clock = clock,
            Stopwatch = stopwatch,
            Gate = gate,
            Surface = surface,
            Board = board,
            Ledger = ledger,
            BlockRows = options.BlockRows,
            Watched = phases,
            RowLimit = double.IsNaN(options.Seconds) ? long.MaxValue : (long)Math.Round(options.Seconds * recording.Format.NominalRateHz),
        });
        return new WatchWiring(sheet, recording)
        {
            FirstStampSeconds = firstStampSeconds,
            Setup = setup,
            Calibrations = calibrations,
            Warmup = warmup,
            Clock = clock,
            Gate = gate,
            Surface = surface,
            Board = board,
            Ledger = ledger,
            Loop = loop,
            Phases = phases,
            Waiting = stopwatch.Lacks,
        };
    }

    /// <summary>A view on the terminal.</summary>
    public TerminalView View() => new(
        Surface,
        new ViewParts
        {
            Setup = Setup,
            Loop = Loop,
            Ledger = Ledger,
            Limits = Budget(_sheet),
            Gate = Gate,
            Phases = Phases,
            Calibration = Calibrations.Files.Count > 0 ? "calibrated" : "not calibrated",
        },
        new ConsoleTerminal());

    /// <summary>Writes what is known before the first block.</summary>
    public void WriteDocuments(SessionFolder folder, WatchOptions options, string recording, DateTimeOffset began)
    {
        new SessionDocument
        {
            Name = _sheet.Session.Name,
            SessionId = Setup.SessionId,
            Seed = Setup.Seed,
            Began = began,
            Clock = ClockWord(options),
            BlockRows = options.BlockRows,
            Waiting = Waiting.Length == 0 ? "absolute sleep, then a short spin" : Waiting,
            NumericsPrint = NumericsPrint,
            Recording = Path.GetFileName(recording),
        }.Write(folder);
        File.Copy(_sheet.File, folder.At("sheet.toml"));
        var number = 0;
        foreach (var path in Calibrations.Files)
        {
            var copy = folder.At(Path.GetFileName(path));
            File.Copy(path, File.Exists(copy) ? folder.At($"{++number}-{Path.GetFileName(path)}") : copy);
        }
    }

    /// <summary>What the recording had wrong with it, known only once it was read.</summary>
    public IReadOnlyList<Status> FeedWarnings() => _recording.Warnings;

    public RunSummary Summary(RunTally tally, SessionFolder folder, WatchOptions options, string recording, bool hasFailed) => new()
    {
        Verb = options.Verb,
        Session = _sheet.Session.Name,
        SessionId = Setup.SessionId,
        Stream = Setup.Format.Name,
        Channels = Setup.Format.ChannelCount,
        RateHz = Setup.Format.NominalRateHz,
        Seconds = Loop.Rows / Setup.Format.NominalRateHz,
        End = hasFailed ? RunEnd.Fault : Loop.End,
        Clock = ClockWord(options),
        BlockRows = options.BlockRows,
        LostRows = Loop.Repair.LostRows,
        Gaps = Loop.Repair.Gaps,
        BlankedRows = Loop.BlankedRows,
        Tally = tally,
        Ledger = Ledger,
        Warmup = Warmup,
        WithoutNoiseModel = Calibrations.WithoutNoiseModel,
        Chance = Calibrations.Chance,
        Truth = Compare(tally, recording),
        Arrays = [.. Setup.Patches.Select(patch =>
            $"patch '{patch.Name}': {patch.Layout.Electrodes.Count} electrodes, {patch.Layout.GoodChannels().Length} of them used")],
        Folder = folder.FullPath,
        NumericsPrint = NumericsPrint,
    };

    /// <summary>Ends the gate: disarmed and quiet. Outcomes can still be taken.</summary>
    public void EndGate()
    {
        if (Clock is VirtualClock virtualClock) virtualClock.Close();   // senders that wait for an instant leave
        Gate.End("the run is over");
    }

    public void Dispose() => EndGate();

    private IEnumerable<Status> LeadNotes(WatchOptions options)
    {
        var blockMs = 1000 * options.BlockRows / Setup.Format.NominalRateHz;
        foreach (var rule in Setup.Rules.Where(rule => rule.LeadMs < blockMs + LeastSpareMs))
        {
            yield return new Status(
                StatusLevel.Warning,
                $"rule '{rule.Name}'",
                $"blocks of {Cell.Number(blockMs, 1)} ms leave too little of its lead of {rule.LeadMs} ms: pulses will be late",
                "shorten the blocks (--block-rows), or lengthen leadMs",
                double.NaN);
        }
    }

    private IEnumerable<Status> WarmupNotes()
    {
        if (Warmup.Trouble.Length > 0) yield return Warn($"it failed: {Warmup.Trouble}", "mend or leave out this part");
        var fewest = Math.Min(Warmup.Pulses, Math.Min(Warmup.Shams, Warmup.Holds));
        if (Setup.Rules.Count > 0 && fewest < Pipeline.Warmup.Enough)
        {
            yield return Warn(
                $"it took {Warmup.Pulses} pulses, {Warmup.Shams} shams, {Warmup.Holds} holds; {Pipeline.Warmup.Enough} of each make sure that the "
                + "first pulse is as quick as later ones",
                "free the machine, or mind the first pulses");
        }

        var limitMs = _sheet.Budget.InAllMs;
        if (Warmup.LateBlockP99Ms > limitMs)
        {
            yield return Warn($"99 % of its blocks took {Cell.Number(Warmup.LateBlockP99Ms, 3)} ms, the budget is {limitMs} ms", "free the machine");
        }
    }

    private static Status Warn(string what, string advice) => new(StatusLevel.Warning, "warm-up", what, advice, double.NaN);

    private static string ClockWord(WatchOptions options) => options.IsRealClock ? "real" : "fast";

    private static string NewSessionId(SessionSheet sheet) =>
        $"{sheet.Session.Name}-{WallClock.Time.GetLocalNow().ToString("yyyyMMdd-HHmmss", CultureInfo.InvariantCulture)}";

    private static List<GateOutput> Outputs(SessionSheet sheet, PartCatalog catalog, IClock clock) =>
    [
        .. sheet.Outputs.Select(output => new GateOutput(
            output.Name, catalog.Make<IOutput>(output.Plugin, new PluginOptions(output.Where, output.Options, clock)))
        {
            PatienceMs = output.PatienceMs,
            IsDummy = output.Dummy,
        }),
    ];

    private static GateLimits? Limits(SessionSheet sheet) => sheet.Limits is { } limits
        ? new GateLimits
        {
            PulsesPerMinute = limits.PulsesPerMinute,
            PulsesPerSession = limits.PulsesPerSession,
            ShortestIntervalMs = limits.ShortestIntervalMs,
            LongestRunMinutes = limits.LongestRunMinutes,
            OldestDataMs = limits.OldestDataMs,
        }
        : null;

    private static BudgetLimits Budget(SessionSheet sheet) =>
        new(sheet.Budget.PhasedMs, sheet.Budget.ReadMs, sheet.Budget.DecidedMs, sheet.Budget.InAllMs);

    private TruthComparison? Compare(RunTally tally, string recording)
    {
        var path = TruthTable.PathBeside(recording);
        if (!File.Exists(path) || double.IsNaN(Loop.NewestStampSeconds)) return null;
        var (patch, band) = Watched();
        return new TruthComparison(
            TruthTable.Read(path),
            [.. tally.Waves.Where(wave => wave.Patch == patch.Name && wave.Band == band)],
            patch.Layout.RotationDegrees,
            FirstStampSeconds,
            Loop.NewestStampSeconds);
    }

    // The patch and band of the first rule; without rules, the first of the sheet.
    private (PatchSetup Patch, string Band) Watched()
    {
        var number = Setup.Rules.Count > 0 ? Setup.Rules[0].Track : 0;
        var track = Setup.Tracks.SelectMany(track => track.Waves.Select(_ => track)).ElementAt(number);
        return (Setup.Patches[track.Patch], track.Band.Name);
    }
}
