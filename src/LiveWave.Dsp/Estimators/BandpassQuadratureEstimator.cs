using System.Runtime.Intrinsics;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>'bandpass-quadrature': a Butterworth band-pass, its quadrature from the value a quarter cycle back, the filter's own
/// phase and gain at the band's centre removed. Needs no calibration and knows no spread.</summary>
/// <remarks><para>The conventional filter, for those who must report one (phase study, section 8): its group delay makes it 1.2 to
/// 1.7 times worse than 'oscillator' on irregular rhythms, and a rhythm 1 Hz off the centre shifts its phase by 30 to 40°.
/// Missing samples are held at the last value. Predictions turn on at the centre frequency.</para>
/// <para>A gap of up to 50 ms is bridged; a longer one is invalid, and so are the 3 / bandwidth seconds with samples after it and
/// after the start, in which the filter settles; with the offset block at least 1 s after the start, and 0.3 s after a gap of
/// more than 1 s.</para></remarks>
public sealed class BandpassQuadratureEstimator : IPhaseEstimator
{
    private const double SettlingCycles = 3;     // of the bandwidth: the envelope of order 2 is then within 1 % of its end value

    private readonly int _order;
    private readonly bool _dcBlock;

    // All made by Prepare.
    private ChannelGate _gate = null!;
    private OffsetBlock? _offset;
    private SectionFilter _filter = null!;
    private Horizons _horizons = null!;
    private Turn _back;
    private Turn[] _turns = [];
    private double[][] _past = [];               // the filter's last quarter cycle, a ring of rows
    private int _oldest;
    private int _channelCount;
    private double _quarterCos;
    private double _quarterSin;
    private double[] _input = [];
    private double[] _filtered = [];
    private double[] _quadrature = [];
    private double[] _nowRe = [];
    private double[] _nowIm = [];
    private double[] _re = [];
    private double[] _im = [];
    private RowInstant _at;

    /// <summary>Makes an estimator.</summary>
    /// <param name="order">Order of the Butterworth design, 1 to 8; the band-pass has twice as many poles.</param>
    /// <param name="dcBlock">Whether offsets are taken away first, as every sheet wants it; false: the band-pass alone.</param>
    /// <exception cref="ArgumentOutOfRangeException">The order is not 1 to 8.</exception>
    public BandpassQuadratureEstimator(int order = 2, bool dcBlock = true)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(order, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, 8);
        _order = order;
        _dcBlock = dcBlock;
    }

    /// <inheritdoc/>
    public void Prepare(StreamFormat format, Band band, Calibration calibration)
    {
        var rateHz = format.NominalRateHz;
        _channelCount = format.ChannelCount;
        _horizons = new Horizons(band);
        _gate = new ChannelGate(_channelCount, rateHz, HoldsOf(band));
        _offset = _dcBlock ? new OffsetBlock(band, rateHz, _channelCount) : null;
        var design = ButterworthDesign.BandPass(_order, band.LowHz, band.HighHz, rateHz);
        _filter = new SectionFilter(design, _channelCount);

        var (re, im) = design.ResponseAt(band.CentreHz, rateHz);
        var power = (re * re) + (im * im);
        _back = new Turn(re / power, -im / power);
        if (_offset is not null) _back *= _offset.Back;

        var quarter = Math.Max(1, (int)Math.Round(rateHz / (4 * band.CentreHz)));
        var radiansPerRow = 2 * Math.PI * band.CentreHz / rateHz;
        (_quarterSin, _quarterCos) = Portable.SinCos(radiansPerRow * quarter);
        _turns = new Turn[_horizons.Count];
        for (var i = 0; i < _turns.Length; i++)
        {
            var (sin, cos) = Portable.SinCos(radiansPerRow * _horizons[i]);
            _turns[i] = new Turn(cos, sin);
        }

        MakeRows(quarter);
        _at = default;
    }

    /// <inheritdoc/>
    public void Step(ReadOnlySpan<double> row, Phasors now)
    {
        _gate.Take(row);
        foreach (var channel in _gate.Begun)
        {
            _offset?.Settle(channel, _gate.Held[channel]);
            _filter.Settle(channel, 0);
        }

        if (_offset is null) _gate.Held.CopyTo(_input);
        else _offset.Step(_gate.Held, _input);

        _filter.Step(_input, _filtered);
        TakeQuadrature();
        _back.Apply(_filtered, _quadrature, _nowRe, _nowIm);
        _at = now.At;
        Fill(_nowRe, _nowIm, now);
    }

    /// <inheritdoc/>
    /// <exception cref="ArgumentOutOfRangeException">The band does not declare this horizon.</exception>
    public void Predict(int horizonSamples, Phasors then)
    {
        var index = _horizons.IndexOf(horizonSamples);
        _turns[index].Apply(_nowRe, _nowIm, _re, _im);
        then.At = _at;
        Fill(_re, _im, then);
    }

    /// <inheritdoc/>
    public void Reset()
    {
        _gate.Reset();
        _offset?.Reset();
        _filter.Reset();
        foreach (var past in _past) past.AsSpan().Clear();
        _oldest = 0;
        _nowRe.AsSpan().Clear();
        _nowIm.AsSpan().Clear();
        _at = default;
    }

    private GateHolds HoldsOf(Band band)
    {
        var settling = SettlingCycles / (2 * band.HalfWidthHz);
        return _dcBlock
            ? new GateHolds(Math.Max(settling, GateHolds.OffsetStartSeconds), settling, Math.Max(settling, GateHolds.OffsetRestartSeconds))
            : new GateHolds(settling, settling, settling);
    }

    private void MakeRows(int quarter)
    {
        var length = RowLength.Padded(_channelCount);
        _past = new double[quarter][];
        for (var i = 0; i < quarter; i++) _past[i] = new double[length];
        _oldest = 0;
        _input = new double[length];
        _filtered = new double[length];
        _quadrature = new double[length];
        _nowRe = new double[length];
        _nowIm = new double[length];
        _re = new double[length];
        _im = new double[length];
    }

    // For a sine the value a quarter cycle back is the quadrature; the exact angle of a whole number of rows is allowed for.
    private void TakeQuadrature()
    {
        var past = Lanes.Of(_past[_oldest]);
        var filtered = Lanes.Of(_filtered);
        var quadrature = Lanes.Of(_quadrature);
        var cos = Vector256.Create(_quarterCos);
        var sin = Vector256.Create(_quarterSin);
        for (var i = 0; i < quadrature.Length; i++)
        {
            quadrature[i] = (past[i] - (filtered[i] * cos)) / sin;
            past[i] = filtered[i];
        }

        _oldest = (_oldest + 1) % _past.Length;
    }

    private void Fill(double[] re, double[] im, Phasors phasors)
    {
        re.AsSpan(0, _channelCount).CopyTo(phasors.Re);
        im.AsSpan(0, _channelCount).CopyTo(phasors.Im);
        phasors.VariancePerAxis.Fill(double.NaN);
        _gate.Mark(phasors.Validity);
    }
}
