using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Reads planar waves: a matched filter over wave vectors in whitened noise, refined by least squares, with the two gates
/// that a field in phase does not pass. In sheets: <c>planar</c>.</summary>
/// <remarks>
/// Statistic: logarithm of the mean over the grid of wave vectors of the marginal likelihood ratio against noise, where the gain over
/// a uniform field (dL) and the gain of an out-of-phase part (Lq) pass their gates. The bank and Λ: <see cref="TemplateBank"/>; the
/// wave vector: <see cref="PlaneFit"/>; Lq: <see cref="OutOfPhase"/>; slowness: <see cref="SlownessTable"/>. Without a noise model
/// noise counts as independent and as strong on every channel. Frames with less evidence than could hold an event are not refined:
/// their wave vector, gates and what follows stay NaN. On a line of electrodes direction is one of two and slowness that along the
/// line. On the way to a decision; no allocation after <see cref="Prepare"/>; one thread.
/// </remarks>
/// <param name="options">What the sheet says.</param>
public sealed class PlanarEstimator(PlanarOptions options) : IWaveEstimator
{
    private const double UsualFramesPerSecond = 250;
    private const double Hysteresis = 0.15;        // of |threshold|: how far evidence may fall while an event holds

    private WhitenedFrame _frame = null!;
    private TemplateBank _bank = null!;
    private (double First, double Second)[] _grid = [];
    private PlaneFit _fromGrid = null!;
    private PlaneFit _fromUniform = null!;
    private LocalFrequency _frequency = null!;
    private PlanarResult _result = null!;
    private double _enter;
    private double _stay;

    /// <summary>With the usual options.</summary>
    public PlanarEstimator()
        : this(new PlanarOptions())
    {
    }

    /// <inheritdoc/>
    public int Prepare(StreamFormat format, Band band, Layout layout, Calibration calibration)
    {
        ArgumentNullException.ThrowIfNull(format);
        ArgumentNullException.ThrowIfNull(band);
        ArgumentNullException.ThrowIfNull(layout);
        ArgumentNullException.ThrowIfNull(calibration);
        if (layout.Electrodes.Count != format.ChannelCount)
        {
            throw new RefusedException(
                $"{layout.Electrodes.Count} electrodes for {format.ChannelCount} channels", "layout", "give one electrode a channel");
        }

        var geometry = new ArrayGeometry(layout, options.ShortestWavelengthMm);
        var whitening = new Whitening(calibration.Noise, geometry.ChannelCount);
        _frame = new WhitenedFrame(geometry.Channels, Scales(layout, calibration, geometry.Channels), whitening);
        _grid = geometry.HalfGrid;
        _bank = new TemplateBank(whitening, Array.ConvertAll(_grid, geometry.Phases));
        (_fromGrid, _fromUniform) = (new PlaneFit(geometry), new PlaneFit(geometry));
        _frequency = new LocalFrequency(geometry.ChannelCount, format.NominalRateHz, band.HighHz);
        _result = new PlanarResult(geometry, layout.RotationDegrees, options);
        var sectors = calibration.ThresholdOf(WaveKind.Planar)?.EnterBySector ?? [];
        _enter = sectors.Count > 0 ? sectors.Min() : Calibration.UncalibratedThreshold;
        _stay = _enter - Hysteresis * Math.Abs(_enter);
        var everySeconds = options.EveryMs > 0 ? options.EveryMs / 1000 : 1 / UsualFramesPerSecond;
        return Math.Max(1, (int)Math.Round(format.NominalRateHz * everySeconds, MidpointRounding.AwayFromZero));
    }

    /// <inheritdoc/>
    public void Read(Phasors now, ref Reading reading)
    {
        var isValid = _frame.Take(now);
        var frequency = _frequency.Next(now.At, _frame);
        if (!isValid)
        {
            reading = new Reading { At = now.At, ObservedShare = _frame.ObservedShare, LocalFrequencyHz = frequency };
            return;
        }

        _bank.Compare(_frame);
        _fromUniform.Template.Hold(_frame, 0, 0);
        var uniform = _fromUniform.Template;
        var explainedByUniform = uniform.Explained / _frame.Energy;
        var synchronous = new Likelihood(_frame, uniform.Denominator).Lambda(uniform.Explained * uniform.Denominator);
        reading = new Reading
        {
            At = now.At,
            IsValid = true,
            ObservedShare = _frame.ObservedShare,
            Statistic = _bank.Evidence,
            Evidence = new KindEvidence { Planar = _bank.Evidence, Synchronous = synchronous },
            StandingShare = _frame.StandingShare,
            UniformShare = _frame.UniformShare,
            LocalFrequencyHz = frequency,
        };
        if (Math.Max(_bank.Evidence, synchronous) < _stay) return;
        _result.Read(_frame, Refined(), explainedByUniform, _enter, ref reading);
    }

    /// <inheritdoc/>
    public void Reset() => _frequency?.Reset();

    private static double[] Scales(Layout layout, Calibration calibration, int[] channels)
    {
        var rms = calibration.ChannelRms;
        if (rms.Count == 0) return Array.ConvertAll(channels, _ => 1.0);
        if (rms.Count != layout.Electrodes.Count)
        {
            throw new RefusedException(
                $"amplitudes of {rms.Count} channels for {layout.Electrodes.Count}", "calibration", "learn a baseline again");
        }

        return Array.ConvertAll(channels, channel => rms[channel] > 0 && double.IsFinite(rms[channel])
            ? 1 / rms[channel]
            : throw new RefusedException(
                $"channel {layout.Electrodes[channel].Channel} had no amplitude in the baseline", "calibration", "mark it as bad"));
    }

    // The better of two fits: long waves lie between k = 0 and the first grid points, where either start may miss them.
    private PlaneFit Refined()
    {
        var (first, second) = _grid[_bank.Best];
        if (_bank.BestIsMinus) (first, second) = (-first, -second);
        _fromGrid.Template.Hold(_frame, first, second);
        _fromGrid.Refine(_frame);
        _fromUniform.Refine(_frame);
        return _fromGrid.Template.Explained >= _fromUniform.Template.Explained ? _fromGrid : _fromUniform;
    }
}
