using System.Runtime.Intrinsics;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>The fixed-gain recursion of a phase model, for all channels at once.</summary>
/// <remarks>Phase study, section 3, in predictor form: kept are each state's prediction for the coming row and the sum of all of
/// them, so one pass over the states takes the innovation in and moves them on. Same operations in the same order as
/// z ← a z; e = x − Σ Re z − Σ y; z ← z + K e. Linear, so the channel's scale does not matter. One array per component.</remarks>
internal sealed class OscillatorBank
{
    private const int RowsBetweenSweeps = 1024;
    private const double Nothing = 1e-150;

    private readonly PhaseModel _model;
    private readonly double[] _gain;
    private readonly double[][] _coming;         // predictions, in the order of the gain: (real, imaginary) per oscillator, background
    private readonly double[][] _filtered;       // (real, imaginary) per oscillator, of the row just taken
    private readonly double[] _comingSum;
    private readonly double[] _innovation;
    private int _rows;

    /// <summary>Makes room; at rest.</summary>
    /// <param name="model">The model.</param>
    /// <param name="gain">Its gain.</param>
    /// <param name="channelCount">At least 1.</param>
    internal OscillatorBank(PhaseModel model, SteadyGain gain, int channelCount)
    {
        _model = model;
        _gain = gain.Gain;
        var length = RowLength.Padded(channelCount);
        _coming = Rows(_gain.Length, length);
        _filtered = Rows(2 * model.Oscillators.Count, length);
        _comingSum = new double[length];
        _innovation = new double[length];
    }

    /// <summary>Takes one row.</summary>
    /// <param name="row">Finite, padded.</param>
    /// <param name="skipped">Where this is not zero the row has no sample and the states only move on. Padded.</param>
    internal void Step(ReadOnlySpan<double> row, ReadOnlySpan<double> skipped)
    {
        Innovate(row, skipped);
        var oscillators = _model.Oscillators.Count;
        for (var j = 0; j < oscillators; j++) StepOscillator(j);
        for (var b = 0; b < _model.Background.Count; b++) StepBackground((2 * oscillators) + b, _model.Background[b].Pole);

        _rows = (_rows + 1) % RowsBetweenSweeps;
        if (_rows == 0) Sweep();
    }

    /// <summary>Sum over the target's oscillators of weight times state, at the row just taken.</summary>
    /// <param name="weights">Per oscillator: rotation, and power of the pole for a prediction. Not read where it is no target.</param>
    /// <param name="re">Filled, padded.</param>
    /// <param name="im">Filled, padded.</param>
    internal void Read(ReadOnlySpan<Turn> weights, Span<double> re, Span<double> im)
    {
        var isFirst = true;
        for (var j = 0; j < weights.Length; j++)
        {
            if (!_model.Oscillators[j].IsTarget) continue;
            if (isFirst) weights[j].Apply(_filtered[2 * j], _filtered[(2 * j) + 1], re, im);
            else weights[j].AddTo(_filtered[2 * j], _filtered[(2 * j) + 1], re, im);
            isFirst = false;
        }
    }

    /// <summary>Puts one channel to rest.</summary>
    /// <param name="channel">The channel.</param>
    internal void Forget(int channel)
    {
        foreach (var state in _coming) state[channel] = 0;
        _comingSum[channel] = 0;
    }

    /// <summary>Back to rest.</summary>
    internal void Reset()
    {
        foreach (var state in _coming) state.AsSpan().Clear();
        foreach (var state in _filtered) state.AsSpan().Clear();
        _comingSum.AsSpan().Clear();
        _rows = 0;
    }

    private static double[][] Rows(int count, int length)
    {
        var rows = new double[count][];
        for (var i = 0; i < count; i++) rows[i] = new double[length];
        return rows;
    }

    private void Innovate(ReadOnlySpan<double> row, ReadOnlySpan<double> skipped)
    {
        var x = Lanes.Of(row);
        var gap = Lanes.Of(skipped);
        var innovation = Lanes.Of(_innovation);
        var sum = Lanes.Of(_comingSum);
        for (var i = 0; i < innovation.Length; i++)
        {
            var present = Vector256.Equals(gap[i], Vector256<double>.Zero);
            innovation[i] = Vector256.ConditionalSelect(present, x[i] - sum[i], Vector256<double>.Zero);
            sum[i] = Vector256<double>.Zero;
        }
    }

    private void StepOscillator(int j)
    {
        var poleRe = Vector256.Create(_model.Oscillators[j].PoleRe);
        var poleIm = Vector256.Create(_model.Oscillators[j].PoleIm);
        var gainRe = Vector256.Create(_gain[2 * j]);
        var gainIm = Vector256.Create(_gain[(2 * j) + 1]);
        var innovation = Lanes.Of(_innovation);
        var sum = Lanes.Of(_comingSum);
        var comingRe = Lanes.Of(_coming[2 * j]);
        var comingIm = Lanes.Of(_coming[(2 * j) + 1]);
        var filteredRe = Lanes.Of(_filtered[2 * j]);
        var filteredIm = Lanes.Of(_filtered[(2 * j) + 1]);
        for (var i = 0; i < innovation.Length; i++)
        {
            var re = comingRe[i] + (gainRe * innovation[i]);
            var im = comingIm[i] + (gainIm * innovation[i]);
            filteredRe[i] = re;
            filteredIm[i] = im;
            var next = (poleRe * re) - (poleIm * im);
            comingRe[i] = next;
            comingIm[i] = (poleRe * im) + (poleIm * re);
            sum[i] += next;
        }
    }

    private void StepBackground(int state, double poleOfState)
    {
        var pole = Vector256.Create(poleOfState);
        var gain = Vector256.Create(_gain[state]);
        var innovation = Lanes.Of(_innovation);
        var sum = Lanes.Of(_comingSum);
        var coming = Lanes.Of(_coming[state]);
        for (var i = 0; i < innovation.Length; i++)
        {
            var next = pole * (coming[i] + (gain * innovation[i]));
            coming[i] = next;
            sum[i] += next;
        }
    }

    // An electrode that goes dead leaves states that shrink until they are subnormal, where an operation takes a hundred times
    // as long, for ever.
    private void Sweep()
    {
        Sweep(_comingSum);
        foreach (var state in _coming) Sweep(state);
    }

    private static void Sweep(double[] states)
    {
        foreach (ref var state in states.AsSpan())
        {
            if (Math.Abs(state) < Nothing) state = 0;
        }
    }
}
