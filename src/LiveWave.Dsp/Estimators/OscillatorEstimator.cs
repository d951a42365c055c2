using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>'oscillator': the steady-state filter of a learnt phase model, one model for all channels of a patch.</summary>
/// <remarks><para>Offset block, recursion with a fixed gain that skips missing samples, rotation back by the offset block's phase at
/// the band's centre. State-space oscillators after Matsuda and Komaki (2017), causal use for phase after Wodeyar et al.
/// (2021); gain, horizon and spread: phase study, sections 3 and 5.</para>
/// <para>A gap of up to 50 ms is bridged; a longer one is invalid until there is a sample again; after more than 1 s a channel
/// begins anew and stays invalid for 0.3 s with samples, and for 1 s at the start.</para></remarks>
public sealed class OscillatorEstimator : IPhaseEstimator
{
    private static readonly GateHolds Holds = new(GateHolds.OffsetStartSeconds, 0, GateHolds.OffsetRestartSeconds);

    // All made by Prepare.
    private ChannelGate _gate = null!;
    private OffsetBlock _offset = null!;
    private OscillatorBank _bank = null!;
    private Horizons _horizons = null!;
    private Turn[] _weightsNow = [];
    private Turn[][] _weightsThen = [];
    private double[] _variance = [];             // per axis, by rows since the last sample; the last one: nothing known any more
    private double[] _scaleSquared = [];
    private double[] _blocked = [];
    private double[] _re = [];
    private double[] _im = [];
    private RowInstant _at;

    /// <inheritdoc/>
    /// <exception cref="RefusedException">There is no phase model, it is of another rate, has no target or no steady filter, or
    /// the scales are not those of the channels.</exception>
    public void Prepare(StreamFormat format, Band band, Calibration calibration)
    {
        var where = $"patch '{calibration.Patch}', band '{band.Name}'";
        var model = calibration.PhaseModel
            ?? throw new RefusedException("estimator 'oscillator' needs a calibration with a phase model, and there is none", where, "give the patch one, or choose 'bandpass-quadrature', which needs none");
        CheckRate(model.RateHz, format.NominalRateHz, where);
        _scaleSquared = ScaleSquared(calibration, format.ChannelCount, where);
        _horizons = new Horizons(band);
        _gate = new ChannelGate(format.ChannelCount, format.NominalRateHz, Holds);
        _offset = new OffsetBlock(band, format.NominalRateHz, format.ChannelCount);
        var gain = SteadyGain.Of(model);
        _bank = new OscillatorBank(model, gain, format.ChannelCount);
        _variance = [.. gain.VarianceAhead(_horizons.Longest + _gate.ForgetRows), gain.StationaryVariance];
        PrepareWeights(model);
        _blocked = new double[RowLength.Padded(format.ChannelCount)];
        _re = new double[_blocked.Length];
        _im = new double[_blocked.Length];
        _at = default;
    }

    /// <inheritdoc/>
    public void Step(ReadOnlySpan<double> row, Phasors now)
    {
        _gate.Take(row);
        foreach (var channel in _gate.Begun)
        {
            _offset.Settle(channel, _gate.Held[channel]);
            _bank.Forget(channel);
        }

        _offset.Step(_gate.Held, _blocked);
        _bank.Step(_blocked, _gate.Skipped);
        _at = now.At;
        Fill(_weightsNow, 0, now);
    }

    /// <inheritdoc/>
    /// <exception cref="ArgumentOutOfRangeException">The band does not declare this horizon.</exception>
    public void Predict(int horizonSamples, Phasors then)
    {
        var index = _horizons.IndexOf(horizonSamples);
        then.At = _at;
        Fill(_weightsThen[index], horizonSamples, then);
    }

    /// <inheritdoc/>
    public void Reset()
    {
        _gate.Reset();
        _offset.Reset();
        _bank.Reset();
        _at = default;
    }

    private static void CheckRate(double modelRateHz, double streamRateHz, string where)
    {
        const double SameRate = 1e-9;            // two ways to write one rate
        if (Math.Abs(modelRateHz - streamRateHz) <= SameRate * streamRateHz) return;
        throw new RefusedException($"the phase model holds at {modelRateHz} Hz, the rows come at {streamRateHz} Hz", where, "learn it again at this rate");
    }

    private static double[] ScaleSquared(Calibration calibration, int channelCount, string where)
    {
        var scales = calibration.ChannelScale;
        if (scales.Count != 0 && scales.Count != channelCount)
        {
            throw new RefusedException($"the calibration has scales of {scales.Count} channels, the patch has {channelCount}", where, "learn it again with these channels");
        }

        var squared = new double[channelCount];
        for (var channel = 0; channel < channelCount; channel++)
        {
            squared[channel] = scales.Count == 0 ? double.NaN : scales[channel] * scales[channel];
        }

        return squared;
    }

    private void PrepareWeights(PhaseModel model)
    {
        var back = _offset.Back;
        _weightsNow = new Turn[model.Oscillators.Count];
        _weightsNow.AsSpan().Fill(back);
        _weightsThen = new Turn[_horizons.Count][];
        var powers = new PolePowers(model.Oscillators);
        for (var ahead = 0; ahead <= _horizons.Longest; ahead++)
        {
            for (var index = 0; index < _horizons.Count; index++)
            {
                if (_horizons[index] != ahead) continue;
                _weightsThen[index] = new Turn[model.Oscillators.Count];
                for (var j = 0; j < model.Oscillators.Count; j++) _weightsThen[index][j] = back * new Turn(powers.Re[j], powers.Im[j]);
            }

            powers.Advance();
        }
    }

    private void Fill(Turn[] weights, int horizonSamples, Phasors phasors)
    {
        _bank.Read(weights, _re, _im);
        var channelCount = _scaleSquared.Length;
        _re.AsSpan(0, channelCount).CopyTo(phasors.Re);
        _im.AsSpan(0, channelCount).CopyTo(phasors.Im);
        _gate.Mark(phasors.Validity);

        var variance = phasors.VariancePerAxis;
        var scaleSquared = _scaleSquared.AsSpan(0, variance.Length);
        if (_gate.IsOrdinary)
        {
            var same = _variance[horizonSamples];
            for (var channel = 0; channel < variance.Length; channel++) variance[channel] = same * scaleSquared[channel];
            return;
        }

        var skipped = _gate.Skipped;
        for (var channel = 0; channel < variance.Length; channel++)
        {
            var gap = skipped[channel];
            var ahead = gap <= _gate.ForgetRows ? horizonSamples + (int)gap : _variance.Length - 1;
            variance[channel] = _variance[ahead] * scaleSquared[channel];
        }
    }
}
