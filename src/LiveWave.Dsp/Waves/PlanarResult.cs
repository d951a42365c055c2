using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Turns a fitted wave vector into what a reading says: gates, direction, wavelength, slowness, kind. No allocation after
/// the start.</summary>
internal sealed class PlanarResult
{
    private const double ResolutionLimit = 0.9;        // of the longest wave vector
    private const double NoDirection = 1e-6;           // of it: shorter than this is rounding
    private const double OneSided95 = 1.645;
    private const double LeastLength = 0.02;           // of a wave vector in standard errors
    private const double MmPerMetre = 1000;

    private readonly ArrayGeometry _geometry;
    private readonly PlanarOptions _options;
    private readonly SlownessTable _slowness;
    private readonly double _sine;
    private readonly double _cosine;

    /// <summary>Prepares the turn to the stated view and the slowness table.</summary>
    /// <param name="geometry">The array.</param>
    /// <param name="rotationDegrees">From the array's frame to the stated view, counter-clockwise.</param>
    /// <param name="options">Gates and slowest wave.</param>
    public PlanarResult(ArrayGeometry geometry, double rotationDegrees, PlanarOptions options)
    {
        _geometry = geometry;
        _options = options;
        _slowness = new SlownessTable(options.GainOverUniform, geometry.Rank);
        (_sine, _cosine) = Portable.SinCos(rotationDegrees * (Math.PI / 180));
    }

    /// <summary>Completes a reading.</summary>
    /// <param name="frame">The frame.</param>
    /// <param name="fit">The better fit.</param>
    /// <param name="explainedByUniform">Share of the whitened energy that one phase all over explains.</param>
    /// <param name="enter">Least evidence for a kind to be named.</param>
    /// <param name="reading">Holds evidence and local frequency; completed.</param>
    public void Read(WhitenedFrame frame, PlaneFit fit, double explainedByUniform, double enter, ref Reading reading)
    {
        var template = fit.Template;
        var gain = Likelihood.Gain(template.Explained / frame.Energy, explainedByUniform, frame.ObservedCount);
        var outOfPhase = OutOfPhase.Gain(frame, template);
        var beatsUniform = gain >= _options.GainOverUniform;
        var isOutOfPhase = outOfPhase >= _options.GainOutOfPhase;
        var evidence = reading.Evidence.Planar;
        reading = reading with
        {
            Statistic = beatsUniform && isOutOfPhase ? evidence : double.NegativeInfinity,
            GainOverUniform = gain,
            GainOutOfPhase = outOfPhase,
        };
        fit.Spread(frame);
        var length = Portable.Hypot(template.First, template.Second);
        Place(frame, fit, length, ref reading);
        var longest = Slowness(length, gain, beatsUniform, ref reading);
        if (Math.Max(evidence, reading.Evidence.Synchronous) < enter) return;
        var excluded = AngularFrequency(reading) / longest / MmPerMetre;
        var slowest = _options.SlowestWaveMetresPerSecond;
        var kind = PlanarKind.Of(
            frame, beatsUniform && isOutOfPhase && evidence >= enter, beatsUniform, isOutOfPhase, slowest > 0 && excluded > slowest);
        reading = kind == WaveKind.NotResolved
            ? reading with { Kind = kind, ExcludedBelowMetresPerSecond = double.IsFinite(excluded) ? excluded : double.NaN }
            : reading with { Kind = kind };
    }

    private static double AngularFrequency(in Reading reading) =>
        reading.LocalFrequencyHz > 0 ? 2 * Math.PI * reading.LocalFrequencyHz : double.NaN;

    private void Place(WhitenedFrame frame, PlaneFit fit, double length, ref Reading reading)
    {
        var (kx, ky) = Turned(_geometry.ToPlane(fit.Template.First, fit.Template.Second));
        var noise = Math.Max((frame.Energy - fit.Template.Explained) / (frame.ObservedCount - 2), 0);
        var (varianceX, varianceY, covariance) = Turned(fit, noise);
        reading = reading with
        {
            WaveVectorX = kx,
            WaveVectorY = ky,
            WaveVectorVarianceX = varianceX,
            WaveVectorVarianceY = varianceY,
            WaveVectorCovariance = covariance,
            IsAtResolutionLimit = length > ResolutionLimit * _geometry.WaveNumberLimit,
        };
        if (!(length > NoDirection * _geometry.WaveNumberLimit)) return;
        var (cosine, sine) = (kx / length, ky / length);
        var degrees = Portable.Atan2(ky, kx) * (180 / Math.PI);
        if (degrees < 0) degrees += 360;
        var across = sine * sine * varianceX - 2 * sine * cosine * covariance + cosine * cosine * varianceY;
        reading = reading with
        {
            DirectionDegrees = degrees < 360 ? degrees : 0,
            DirectionCosine = cosine,
            DirectionSine = sine,
            DirectionStandardErrorDegrees =
                _geometry.Rank == 2 ? Math.Sqrt(Math.Max(across, 0)) / length * (180 / Math.PI) : double.NaN,
            WavelengthMm = 2 * Math.PI / length,
        };
    }

    private (double X, double Y) Turned((double X, double Y) v) => (v.X * _cosine - v.Y * _sine, v.X * _sine + v.Y * _cosine);

    private (double VarianceX, double VarianceY, double Covariance) Turned(PlaneFit fit, double noise)
    {
        var (xx, xy, yy) = (fit.VarianceFirst * noise, fit.Covariance * noise, fit.VarianceSecond * noise);
        if (_geometry.Rank == 1)
        {
            var (axisX, axisY) = (_geometry.AxisX, _geometry.AxisY);
            (xx, xy, yy) = (xx * axisX * axisX, xx * axisX * axisY, xx * axisY * axisY);
        }

        var (c, s) = (_cosine, _sine);
        return (c * c * xx - 2 * c * s * xy + s * s * yy, s * s * xx + 2 * c * s * xy + c * c * yy,
            c * s * (xx - yy) + (c * c - s * s) * xy);
    }

    // Above the gate: the interval given that it was passed. Below: everything from 0 up to a one-sided limit.
    private double Slowness(double length, double gain, bool beatsUniform, ref Reading reading)
    {
        var standardErrors = Math.Max(Math.Sqrt(2 * Math.Max(gain, 0)), LeastLength);
        var (low, middle, high) = beatsUniform ? _slowness.Factors(gain) : (0, 1, 1 + OneSided95 / standardErrors);
        var slowness = length / AngularFrequency(reading) * MmPerMetre;
        reading = reading with { SlownessLow = low * slowness, SlownessMiddle = middle * slowness, SlownessHigh = high * slowness };
        return high * length;
    }
}
