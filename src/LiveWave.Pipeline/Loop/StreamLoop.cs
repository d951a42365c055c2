using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One turn: pull a block, repair it, judge it row by row, commit what was decided, publish.</summary>
/// <remarks>Runs on whoever calls <see cref="RunOnce"/>: a <see cref="DecisionThread"/>, or a test. No queue, lock or wait but
/// the feed's, and no allocation in steady state. Outcomes are taken from the gate and told; they never reach the core.</remarks>
public sealed class StreamLoop
{
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(50);
    private readonly RunParts _parts;
    private readonly RunSetup _setup;
    private readonly DecisionCore _core;
    private readonly StreamRepair _repair;
    private readonly SampleBlock _block;
    private readonly RepairedRows _rows;
    private readonly OpenDecisions _open = new();
    private readonly List<Outcome> _nothingDue = new(64);
    private double _turnStarted;
    private int _committed;

    /// <summary>Makes and prepares the run.</summary>
    /// <param name="setup">What it is made of.</param>
    /// <param name="parts">What surrounds it.</param>
    /// <exception cref="RefusedException">A part can't run with this stream, layout or calibration.</exception>
    public StreamLoop(RunSetup setup, RunParts parts)
    {
        ArgumentNullException.ThrowIfNull(setup);
        ArgumentNullException.ThrowIfNull(parts);
        _setup = setup;
        _parts = parts;
        _core = new DecisionCore(setup, OnFault, parts.Watched);
        _repair = new StreamRepair(setup.Format);
        _block = new SampleBlock(setup.Format, parts.BlockRows);
        _rows = new RepairedRows(parts.BlockRows);
    }

    /// <summary>Why it is over; <see cref="RunEnd.None"/> while it goes on.</summary>
    public RunEnd End { get; private set; }

    /// <summary>Rows judged.</summary>
    public long Rows { get; private set; }

    /// <summary>Stamp of the newest row judged, seconds; NaN before the first.</summary>
    public double NewestStampSeconds { get; private set; } = double.NaN;

    /// <summary>What was lost, found and restarted on the way in.</summary>
    public StreamRepair Repair => _repair;

    /// <summary>Rows marked as missing because of own pulses.</summary>
    public long BlankedRows => _core.BlankedRows;

    /// <summary>One turn.</summary>
    /// <returns>False when the run is over.</returns>
    public bool RunOnce()
    {
        if (End != RunEnd.None) return false;
        var result = _parts.Feed.Pull(_block, Patience);
        _turnStarted = _parts.Stopwatch.NowSeconds;
        _parts.Gate.Watch(_parts.Clock.NowSeconds);
        if (result == PullResult.Samples)
        {
            JudgeBlock();
        }
        else if (result != PullResult.Nothing)
        {
            Finish(result == PullResult.Ended ? RunEnd.Ended : RunEnd.Lost);
        }

        DrainOutcomes();
        DrainStatus();
        return End == RunEnd.None;
    }

    /// <summary>Ends the run: events that pass are closed. Then drain what the gate still has.</summary>
    /// <param name="why">The reason.</param>
    public void Finish(RunEnd why)
    {
        if (End != RunEnd.None) return;
        End = why;
        _core.Finish();
        CommitNew();
        PublishJudged();
    }

    /// <summary>Publishes outcomes and statuses that came since; call after the gate was closed.</summary>
    public void DrainAll()
    {
        DrainOutcomes();
        DrainStatus();
    }

    private void JudgeBlock()
    {
        var allocated = GC.GetAllocatedBytesForCurrentThread();
        _block.StampReceived(_parts.Clock.NowSeconds);
        _repair.Apply(_block, _rows);
        var judged = 0;
        for (; judged < _rows.Count && _rows[judged].Received < _parts.RowLimit; judged++) JudgeRow(_rows[judged], _block.Row(judged));
        _parts.Ledger.Block(_parts.Stopwatch.NowSeconds - _turnStarted);
        _parts.Ledger.DecisionThreadBytes += GC.GetAllocatedBytesForCurrentThread() - allocated;
        _parts.Surface.Blocks.Tell(_block);   // before what was read from it: a table counts onsets from the first block's first stamp
        if (judged < _rows.Count) Finish(RunEnd.RowLimit);
        else PublishJudged();
        if (_parts.Checks) _block.Poison();
    }

    private void JudgeRow(in RowInstant now, ReadOnlySpan<double> row)
    {
        Rows++;
        NewestStampSeconds = now.StampSeconds;
        if (!_core.StepPhase(now, row))
        {
            // Where a conditioner swallowed the row of a restart, holds of what it ended are there already.
            if (_core.Decisions.Count > _committed) CommitNew(now.StampSeconds);
            return;
        }

        var phased = Elapsed();
        _core.Read(now);
        var read = Elapsed();
        _core.Decide(now);
        if (_core.Decisions.Count > _committed) CommitNew(now.StampSeconds, phased, read);
    }

    private void CommitNew(double stamp = double.NaN, double phased = double.NaN, double read = double.NaN)
    {
        var received = _block.ReceivedSeconds;
        var decided = Elapsed();
        for (; _committed < _core.Decisions.Count; _committed++)
        {
            var decision = _core.Decisions[_committed];
            var stages = new StageStamps(
                stamp, received, received + phased, received + read, received + decided, decision.DueSeconds, double.NaN, double.NaN);
            _parts.Ledger.Decision(stages);
            var outputs = OutputsOf(decision);
            if (decision.Kind == DecisionKind.Hold || outputs.Count == 0)
            {
                _open.Add(decision, 1);
                _nothingDue.Add(new Outcome(decision.Number, "", OutcomeKind.NothingDue, stages, 0, 0));
                continue;
            }

            _open.Add(decision, outputs.Count);
            for (var i = 0; i < outputs.Count; i++) _parts.Gate.Commit(decision, stages, outputs[i]);
        }
    }

    private IReadOnlyList<int> OutputsOf(in Decision decision)
    {
        for (var i = 0; i < _setup.Rules.Count; i++)
        {
            if (_setup.Rules[i].Name == decision.Rule) return _setup.Rules[i].Outputs;
        }

        return [];
    }

    private void PublishJudged()
    {
        for (var i = 0; i < _core.Readings.Count; i++) _parts.Surface.Readings.Tell(_core.Readings[i]);
        for (var i = 0; i < _core.Events.Count; i++) _parts.Surface.Events.Tell(_core.Events[i]);
        for (var i = 0; i < _core.Decisions.Count; i++) _parts.Surface.Decisions.Tell(_core.Decisions[i]);
        _core.Forget();
        _committed = 0;
    }

    private void DrainOutcomes()
    {
        foreach (var outcome in _nothingDue) Join(outcome);
        _nothingDue.Clear();
        while (_parts.Gate.TryTake(out var outcome)) Join(outcome);
    }

    private void Join(in Outcome outcome)
    {
        if (!_open.TryJoin(outcome, out var verdict)) return;
        _parts.Ledger.Outcome(verdict.Outcome.Stages);
        _parts.Surface.Verdicts.Tell(verdict);
    }

    private void DrainStatus()
    {
        while (_parts.Board.TryTake(out var status))
        {
            if (status.Level == StatusLevel.Fault) _parts.Gate.DisarmWithoutWaiting($"{status.Where}: {status.What}");
            _parts.Surface.Status.Tell(status);
        }

        while (_parts.Gate.TryTakeNotice(out var notice)) _parts.Surface.Status.Tell(notice);
    }

    private double Elapsed() => _parts.Stopwatch.NowSeconds - _turnStarted;

    private void OnFault(string where, Exception error)
    {
        _parts.Gate.DisarmWithoutWaiting($"{where} failed");
        _parts.Board.Post(StatusLevel.Fault, where, $"failed and decides no more: {error.Message}", "mend or leave out this part");
    }
}
