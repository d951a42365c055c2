using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One wave estimator on one band of one patch: reads the frames that are due and joins them to wave events.</summary>
public sealed class WaveTrack
{
    private readonly IWaveEstimator _estimator;
    private readonly FrameGrid _grid;
    private readonly EventMachine _machine;
    private readonly Phasors _phasors;
    private readonly long _indexStep;
    private readonly string _patch;
    private readonly string _band;
    private readonly string _name;
    private Reading _latest = new();
    private WaveEvent _began;
    private WaveEvent _passing;
    private WaveEvent _ended;

    internal WaveTrack(WaveTrackSetup wave, PhaseTrackSetup track, PatchSetup patch, StreamFormat format, Phasors phasors, long indexStep)
    {
        (_patch, _band, _name) = (patch.Name, track.Band.Name, wave.Estimator);
        _phasors = phasors;
        _indexStep = indexStep;
        _estimator = wave.MakeWave();
        var samplesPerFrame = _estimator.Prepare(format, track.Band, patch.Layout, track.Calibration);
        _grid = new FrameGrid(samplesPerFrame * indexStep);
        _machine = new EventMachine(new EventRule(Thresholds(track.Calibration), format.NominalRateHz / samplesPerFrame)
        {
            MinimumMs = wave.Event.MinimumMs,
            StabilityMs = wave.Event.StabilityMs,
            StabilityDegrees = wave.Event.StabilityDegrees,
            GapMs = wave.Event.GapMs,
            RefractoryMs = wave.Event.RefractoryMs,
        });
    }

    /// <summary>The newest reading.</summary>
    public ref readonly Reading Latest => ref _latest;

    /// <summary>An event passes, and nothing failed: what a part said before it failed decides no more.</summary>
    public bool IsPassing => !HasFailed && _machine.State == WaveEventState.Passing;

    /// <summary>The event that passes, as it stands at the newest frame: direction over the last frames, and the standard error
    /// and evidence of the newest frame that held it.</summary>
    public ref readonly WaveEvent Passing => ref _passing;

    /// <summary>Evidence of the newest frame that held the event.</summary>
    public double PassingEvidence { get; private set; }

    /// <summary>An event that had passed is over and rules have not closed it yet.</summary>
    public bool HasEnded { get; private set; }

    /// <summary>That event: as it was when it began to pass, with its end.</summary>
    public ref readonly WaveEvent Ended => ref _ended;

    /// <summary>The estimator, or the phase estimator before it, failed: nothing more is read.</summary>
    public bool HasFailed { get; private set; }

    internal bool IsDue(long index, out long frame) => _grid.IsDue(index, out frame);

    /// <summary>Reads a frame.</summary>
    /// <returns>What happened to the event.</returns>
    internal EventTransition Read(long frame, in RowInstant now, ref long events)
    {
        _phasors.At = now with { Index = now.Index / _indexStep };
        _estimator.Read(_phasors, ref _latest);
        _latest = _latest with { At = now, Patch = _patch, Band = _band, Estimator = _name };
        var happened = _machine.Step(frame, _latest);
        if ((happened & EventTransition.Ended) != 0) Finish();
        if ((happened & EventTransition.Passed) != 0) Begin(++events);
        if (IsPassing) Follow();
        return happened;
    }

    /// <summary>The stream is over or begins anew: what passes ends here.</summary>
    /// <returns>True if an event ended.</returns>
    internal bool End()
    {
        if ((_machine.Close() & EventTransition.Ended) == 0) return false;
        Finish();
        return true;
    }

    /// <summary>Rules have closed the event that ended.</summary>
    internal void Settle() => HasEnded = false;

    internal void Fail() => HasFailed = true;

    internal void Reset()
    {
        _estimator.Reset();
        _machine.Reset();
    }

    private static IReadOnlyList<double> Thresholds(Calibration calibration) =>
        calibration.ThresholdOf(WaveKind.Planar)?.EnterBySector ?? [Calibration.UncalibratedThreshold];

    private void Begin(long number)
    {
        _passing = new WaveEvent
        {
            Number = number,
            Patch = _patch,
            Band = _band,
            Estimator = _name,
            State = WaveEventState.Passing,
            Kind = _machine.Current.Kind,
            Onset = _machine.Current.Onset,
            Passed = _machine.Current.Passed,
            DirectionDegrees = _machine.Current.DirectionDegrees,
            DirectionStandardErrorDegrees = _latest.DirectionStandardErrorDegrees,
            WavelengthMm = _latest.WavelengthMm,
            SlownessLow = _latest.SlownessLow,
            SlownessMiddle = _latest.SlownessMiddle,
            SlownessHigh = _latest.SlownessHigh,
            FrequencyHz = _latest.LocalFrequencyHz,
        };
        _began = _passing;
    }

    private void Follow()
    {
        var isHeld = _machine.Current.Last == _latest.At;
        if (isHeld) PassingEvidence = _latest.Statistic;
        _passing = _passing with
        {
            Last = _machine.Current.Last,
            DirectionDegrees = _machine.ResultantDegrees,
            DirectionStandardErrorDegrees = isHeld ? _latest.DirectionStandardErrorDegrees : _passing.DirectionStandardErrorDegrees,
            PeakEvidence = _machine.Current.PeakEvidence,
            Frames = _machine.Current.Frames,
        };
    }

    private void Finish()
    {
        _ended = _began with
        {
            State = WaveEventState.Quiet,
            Last = _machine.Over.Last,
            PeakEvidence = _machine.Over.PeakEvidence,
            Frames = _machine.Over.Frames,
        };
        HasEnded = true;
    }
}
