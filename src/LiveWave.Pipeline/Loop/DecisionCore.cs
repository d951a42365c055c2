using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>From a repaired row to decisions: blanking, conditioning, phase, readings, events, rules.</summary>
/// <remarks>A pure function of the rows, the setup, seed and session id: no clock, no outcome, no thread. One caller. Allocates
/// nothing in steady state; what a row gave is read from <see cref="Readings"/>, <see cref="Events"/>, <see cref="Decisions"/>
/// until <see cref="Forget"/>.</remarks>
public sealed class DecisionCore
{
    private readonly ConditioningChain _conditioning;
    private readonly BlankingMark _blanking;
    private readonly PatchTrack[] _patches;
    private readonly PhaseTrack[] _bands;
    private readonly WaveTrack[] _waves;
    private readonly RuleJudge[] _rules;
    private readonly double[] _missing;
    private readonly long _longestBridgeRows;
    private long _lastIndex = -1;
    private long _events;
    private long _decisions;

    /// <summary>Makes and prepares every part.</summary>
    /// <param name="setup">What the run is made of.</param>
    /// <param name="onFault">Hears of an estimator that failed: where, and the error.</param>
    /// <param name="watched">Where frames' phasors are shown, one per track of the setup; none by default. Written, never read.</param>
    /// <exception cref="RefusedException">A part can't run with this stream, layout or calibration.</exception>
    public DecisionCore(RunSetup setup, Action<string, Exception> onFault, IReadOnlyList<PhaseSnapshot>? watched = null)
    {
        ArgumentNullException.ThrowIfNull(setup);
        ArgumentNullException.ThrowIfNull(onFault);
        var rateHz = setup.Format.NominalRateHz;
        _conditioning = new ConditioningChain([.. setup.Conditioners.Select(make => make())], setup.Format);
        _blanking = new BlankingMark((int)Math.Ceiling(setup.BlankAfterPulseMs * rateHz / 1000));
        var indexStep = Math.Max(1, (long)Math.Round(rateHz / _conditioning.Output.NominalRateHz));
        _patches =
        [
            .. setup.Patches.Select((patch, number) => new PatchTrack(patch, number, setup, _conditioning.Output, indexStep, onFault, watched ?? [])),
        ];
        _bands = [.. setup.Tracks.Select((track, at) => _patches[track.Patch].BandOf(at))];
        _waves = [.. _bands.SelectMany(band => band.Waves)];
        _rules = [.. setup.Rules.Select(rule => new RuleJudge(rule, rateHz, setup.Seed, setup.SessionId))];
        _missing = new double[setup.Format.ChannelCount];
        _missing.AsSpan().Fill(double.NaN);
        _longestBridgeRows = (long)(LongestBridgeSeconds * rateHz);
    }

    /// <summary>A gap longer than this is not bridged row by row: every stage starts from rest.</summary>
    public const double LongestBridgeSeconds = 1.0;

    /// <summary>Readings since the last <see cref="Forget"/>.</summary>
    public List<Reading> Readings { get; } = new(256);

    /// <summary>Event transitions since the last <see cref="Forget"/>.</summary>
    public List<WaveEvent> Events { get; } = new(64);

    /// <summary>Decisions since the last <see cref="Forget"/>.</summary>
    public List<Decision> Decisions { get; } = new(64);

    /// <summary>Rows marked as missing because of own pulses.</summary>
    public long BlankedRows => _blanking.MarkedRows;

    /// <summary>The wave tracks, numbered as rules name them.</summary>
    public IReadOnlyList<WaveTrack> Waves => _waves;

    /// <summary>Forgets what was read, in readings, events and decisions; no state.</summary>
    public void Forget()
    {
        Readings.Clear();
        Events.Clear();
        Decisions.Clear();
    }

    /// <summary>First part of a row: blanking, conditioning, phase.</summary>
    /// <param name="now">When the row is.</param>
    /// <param name="row">As received, physical units.</param>
    /// <returns>True if a conditioned row came out, so that <see cref="Read"/> and <see cref="Decide"/> follow.</returns>
    public bool StepPhase(in RowInstant now, ReadOnlySpan<double> row)
    {
        if ((now.Breaks & RowBreaks.Restart) != 0) StartAnew();
        else if ((now.Breaks & RowBreaks.Gap) != 0) Bridge(now);
        _lastIndex = now.Index;
        var taken = _blanking.Covers(now.Index) ? _missing : row;
        if (!_conditioning.Step(taken, out var conditioned)) return false;
        foreach (var patch in _patches) patch.StepPhase(now, conditioned);
        return true;
    }

    /// <summary>Second part: readings of the frames that are due, and the event machines.</summary>
    /// <param name="now">When the row is.</param>
    public void Read(in RowInstant now)
    {
        foreach (var band in _bands)
        {
            foreach (var wave in band.Waves)
            {
                if (wave.HasFailed) EndOf(wave);
                else if (wave.IsDue(now.Index, out var frame)) ReadFrame(band, wave, frame, now);
            }
        }
    }

    /// <summary>Third part: rules.</summary>
    /// <param name="now">When the row is.</param>
    public void Decide(in RowInstant now)
    {
        CloseEnded();
        foreach (var rule in _rules)
        {
            var wave = _waves[rule.Rule.Track];
            if (!wave.IsPassing || !rule.Judge(wave.Passing, wave.PassingEvidence, now, out var act)) continue;
            _blanking.Add(now.Index + rule.LeadRows);
            Add(act);
        }
    }

    /// <summary>The stream is over: events that still pass end here, with a hold where nothing was decided.</summary>
    public void Finish()
    {
        foreach (var wave in _waves) EndOf(wave);
        CloseEnded();
    }

    private void ReadFrame(PhaseTrack band, WaveTrack wave, long frame, in RowInstant now)
    {
        var happened = band.Read(wave, frame, now, ref _events);
        if (wave.HasFailed) return;
        Readings.Add(wave.Latest);
        if ((happened & EventTransition.Ended) != 0) Events.Add(wave.Ended);
        if ((happened & EventTransition.Passed) != 0) Events.Add(wave.Passing);
    }

    private void EndOf(WaveTrack wave)
    {
        if (wave.End()) Events.Add(wave.Ended);
    }

    private void Add(in Decision decision) => Decisions.Add(decision with { Number = ++_decisions });

    private void Bridge(in RowInstant now)
    {
        var lost = now.Index - _lastIndex - 1;
        if (lost > _longestBridgeRows)
        {
            StartAnew();
            return;
        }

        for (var index = _lastIndex + 1; index < now.Index; index++)
        {
            if (!_conditioning.Step(_missing, out var conditioned)) continue;
            var instant = now with { Index = index, Breaks = RowBreaks.None };
            foreach (var patch in _patches) patch.StepPhase(instant, conditioned);
        }
    }

    private void StartAnew()
    {
        foreach (var wave in _waves) EndOf(wave);
        CloseEnded();
        _conditioning.Reset();
        foreach (var patch in _patches) patch.Reset();
    }

    private void CloseEnded()
    {
        foreach (var rule in _rules)
        {
            var wave = _waves[rule.Rule.Track];
            if (wave.HasEnded && rule.Close(wave.Ended, out var hold)) Add(hold);
        }

        foreach (var wave in _waves) wave.Settle();
    }
}
