using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Joins frames to wave events: quiet → forming → passing → quiet, of one patch, band and estimator.</summary>
/// <remarks>
/// Forms at the first frame whose statistic reaches the threshold of its direction's sector, holds while it is above that less 15 %
/// and bridges short gaps, passes once it is long enough and its direction steady, at a frame that itself holds. One event passes
/// once. Its end is known only when the gap is too long, one frame more than may be bridged after its last one, or when frames jump.
/// On the way to a decision; no allocation after the start; one thread.
/// </remarks>
internal sealed class EventMachine
{
    private const double WholeTurn = 360;

    private readonly double[] _enter;
    private readonly double[] _stay;
    private readonly double _highestEnter;
    private readonly int _minimum;
    private readonly int _gap;
    private readonly int _refractory;
    private readonly double _leastResultant;
    private readonly SteadyWindow _window;
    private EventTrace _current;
    private EventTrace _over;
    private long _frame = long.MinValue;
    private long _freeFrom = long.MinValue;

    /// <summary>Quiet.</summary>
    /// <param name="rule">When frames are an event.</param>
    public EventMachine(EventRule rule)
    {
        _enter = [.. rule.EnterBySector];
        _stay = Array.ConvertAll(_enter, EventRule.Stay);
        _highestEnter = _enter.Max();
        (_minimum, _gap, _refractory) = (rule.MinimumFrames, rule.GapFrames, rule.RefractoryFrames);
        _leastResultant = rule.LeastResultant;
        _window = new SteadyWindow(rule.StabilityFrames);
    }

    /// <summary>What goes on.</summary>
    public WaveEventState State { get; private set; } = WaveEventState.Quiet;

    /// <summary>The event that forms or passes; where all is quiet, the last one.</summary>
    public ref readonly EventTrace Current => ref _current;

    /// <summary>The event that ended or faded last.</summary>
    public ref readonly EventTrace Over => ref _over;

    /// <summary>Direction of the current event now: angle of the mean unit vector over the last frames, at most those of the
    /// stability window; degrees [0, 360), NaN where it has none.</summary>
    public double ResultantDegrees => _window.Degrees;

    /// <summary>Length of that mean, 0 to 1: 1 where the direction does not change.</summary>
    public double ResultantLength => _window.Length;

    /// <summary>Takes one frame.</summary>
    /// <param name="frame">Its number, larger than the last one's; the frames between count as missing.</param>
    /// <param name="reading">What was read in it.</param>
    /// <returns>What happened; <see cref="Over"/> tells of what ended or faded, <see cref="Current"/> of what formed or passes.</returns>
    public EventTransition Step(long frame, in Reading reading)
    {
        var happened = EventTransition.Nothing;
        if (State != WaveEventState.Quiet)
        {
            var missing = frame - _frame - 1;
            if (missing > 0 && frame - 1 - _current.LastFrame > _gap) happened = Finish();
            else _window.AddMissing(missing);
        }

        _frame = frame;
        var (enter, stay) = Thresholds(reading.DirectionDegrees);
        var statistic = reading.IsValid ? reading.Statistic : double.NegativeInfinity;
        if (State == WaveEventState.Quiet)
        {
            if (frame < _freeFrom || !(statistic >= enter)) return happened;
            Begin(frame, reading);
            happened |= EventTransition.Formed;
        }

        _window.Add(reading.DirectionCosine, reading.DirectionSine);
        if (!(statistic >= stay)) return frame - _current.LastFrame > _gap ? happened | Finish() : happened;
        Hold(frame, reading);
        return MayPass(frame) ? happened | Pass(frame, reading) : happened;
    }

    /// <summary>Ends what forms or passes: the stream is over, or begins anew.</summary>
    /// <returns>Faded, ended, or nothing.</returns>
    public EventTransition Close() => State == WaveEventState.Quiet ? EventTransition.Nothing : Finish();

    /// <summary>As new.</summary>
    public void Reset()
    {
        State = WaveEventState.Quiet;
        (_current, _over) = (default, default);
        (_frame, _freeFrom) = (long.MinValue, long.MinValue);
        _window.Clear();
    }

    private (double Enter, double Stay) Thresholds(double degrees)
    {
        if (_enter.Length == 1) return (_enter[0], _stay[0]);
        // A frame without direction belongs to no sector: it must do for any.
        if (double.IsNaN(degrees)) return (_highestEnter, EventRule.Stay(_highestEnter));
        var sector = (int)(degrees / WholeTurn * _enter.Length + 0.5) % _enter.Length;
        return (_enter[sector], _stay[sector]);
    }

    private void Begin(long frame, in Reading reading)
    {
        State = WaveEventState.Forming;
        _window.Clear();
        _current = new EventTrace
        {
            OnsetFrame = frame,
            Onset = reading.At,
            PassedFrame = -1,
            DirectionDegrees = double.NaN,
            Kind = reading.Kind,
            PeakEvidence = double.NegativeInfinity,
        };
    }

    private void Hold(long frame, in Reading reading)
    {
        var isStrongest = reading.Statistic > _current.PeakEvidence;
        _current = _current with
        {
            LastFrame = frame,
            Last = reading.At,
            Kind = isStrongest ? reading.Kind : _current.Kind,
            PeakEvidence = isStrongest ? reading.Statistic : _current.PeakEvidence,
            Frames = _current.Frames + 1,
        };
    }

    private bool MayPass(long frame) =>
        State == WaveEventState.Forming
        && frame - _current.OnsetFrame + 1 >= _minimum
        && _window.Length >= _leastResultant;

    private EventTransition Pass(long frame, in Reading reading)
    {
        State = WaveEventState.Passing;
        _current = _current with { PassedFrame = frame, Passed = reading.At, DirectionDegrees = _window.Degrees };
        return EventTransition.Passed;
    }

    private EventTransition Finish()
    {
        var hadPassed = State == WaveEventState.Passing;
        State = WaveEventState.Quiet;
        _over = _current;
        if (hadPassed) _freeFrom = _current.LastFrame + 1 + _refractory;
        return hadPassed ? EventTransition.Ended : EventTransition.Faded;
    }
}
