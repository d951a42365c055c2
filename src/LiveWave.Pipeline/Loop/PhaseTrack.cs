using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One band of one patch: its phase estimator and the wave tracks that read from it.</summary>
/// <remarks>An estimator that throws ends the decisions of its band, and nothing else: caught here and reported.</remarks>
public sealed class PhaseTrack
{
    private readonly IPhaseEstimator _phase;
    private readonly Phasors _now;
    private readonly long _indexStep;
    private readonly string _where;
    private readonly Action<string, Exception> _onFault;
    private readonly PhaseSnapshot? _watched;
    private bool _hasFailed;

    internal PhaseTrack(
        PhaseTrackSetup setup, PatchSetup patch, StreamFormat format, long indexStep, Action<string, Exception> onFault, PhaseSnapshot? watched)
    {
        _watched = watched;
        _where = $"patch '{patch.Name}', band '{setup.Band.Name}'";
        _onFault = onFault;
        _indexStep = indexStep;
        _phase = setup.MakePhase();
        _phase.Prepare(format, setup.Band, setup.Calibration);
        _now = new Phasors(format.ChannelCount);
        Waves = [.. setup.Waves.Select(wave => new WaveTrack(wave, setup, patch, format, _now, indexStep))];
    }

    internal WaveTrack[] Waves { get; }

    internal void Step(in RowInstant now, ReadOnlySpan<double> row)
    {
        if (_hasFailed) return;
        _now.At = now with { Index = now.Index / _indexStep };
        try
        {
            _phase.Step(row, _now);
        }
        catch (Exception error)
        {
            Fail(error);
        }
    }

    internal EventTransition Read(WaveTrack wave, long frame, in RowInstant now, ref long events)
    {
        try
        {
            var happened = wave.Read(frame, now, ref events);
            _watched?.Write(_now);
            return happened;
        }
        catch (Exception error)
        {
            Fail(error);
            return EventTransition.Nothing;
        }
    }

    internal void Reset()
    {
        _phase.Reset();
        foreach (var wave in Waves) wave.Reset();
    }

    private void Fail(Exception error)
    {
        _hasFailed = true;
        foreach (var wave in Waves) wave.Fail();
        _onFault(_where, error);
    }
}
