using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class PlanarEstimatorTests
{
    private const double Noise = 0.15;

    private static readonly Layout Array = WaveFrames.Grid(8, 8);

    [Property(Replay = "2026,1201", MaxTest = 40)]
    public bool Direction_and_wavelength_are_those_of_the_wave(ushort direction, byte stretch)
    {
        var degrees = direction % 3600 / 10.0;
        var wavelengthMm = 2.0 + stretch / 64.0;

        var reading = WaveFrames.Read(Array, WaveFrames.Frame(Array, WaveFrames.Plane(wavelengthMm, degrees)));

        return reading.Kind == WaveKind.Planar
            && Math.Abs(Math.IEEERemainder(reading.DirectionDegrees - degrees, 360)) < 1e-3
            && Math.Abs(reading.WavelengthMm / wavelengthMm - 1) < 1e-4
            && Math.Abs(reading.DirectionCosine - Math.Cos(degrees * Math.PI / 180)) < 1e-4
            && Math.Abs(reading.DirectionSine - Math.Sin(degrees * Math.PI / 180)) < 1e-4;
    }

    // The worked example of our wave study: phase falls 30° a mm to the right and rises 20° a mm upwards.
    [Fact]
    public void A_wave_travels_towards_electrodes_that_peak_later()
    {
        var layout = WaveFrames.Grid(4, 4, pitchMm: 1);
        static double Phase(double x, double y, double seconds) => (60 - 30 * x + 20 * y) * Math.PI / 180 + 2 * Math.PI * 10 * seconds;

        var reading = WaveFrames.Read(
            layout,
            WaveFrames.Frame(layout, (x, y) => Phase(x, y, 0)),
            WaveFrames.Frame(layout, (x, y) => Phase(x, y, 0.004), index: 4));

        Assert.Equal(326.31, reading.DirectionDegrees, 0.01);
        Assert.Equal(9.985, reading.WavelengthMm, 0.001);
        Assert.Equal(10, reading.LocalFrequencyHz, 1e-9);
        Assert.Equal(0.09985, 1 / reading.SlownessMiddle, 0.0002);
    }

    [Fact]
    public void A_missing_channel_reads_as_an_array_without_it()
    {
        var plane = WaveFrames.Plane(3.1, 200);
        var holes = new[] { 11, 37, 50 };
        var without = new Layout([.. Array.Electrodes.Select((electrode, i) => electrode with { IsGood = !holes.Contains(i) })]);
        var frame = WaveFrames.Frame(Array, plane, Noise);
        foreach (var hole in holes) (frame.Validity[hole], frame.Re[hole]) = (Validity.Bridged, 9);

        var withHoles = WaveFrames.Read(Array, Calibrated(Array), new PlanarOptions(), frame);
        var smaller = WaveFrames.Read(without, Calibrated(without, Array), new PlanarOptions(), WaveFrames.Frame(Array, plane, Noise));

        Assert.Equal(smaller.Statistic, withHoles.Statistic, 1e-9);
        Assert.Equal(smaller.Evidence.Synchronous, withHoles.Evidence.Synchronous, 1e-9);
        Assert.Equal(smaller.GainOverUniform, withHoles.GainOverUniform, 1e-7);
        Assert.Equal(smaller.GainOutOfPhase, withHoles.GainOutOfPhase, 1e-7);
        Assert.Equal(smaller.DirectionDegrees, withHoles.DirectionDegrees, 1e-9);
        Assert.Equal(smaller.DirectionStandardErrorDegrees, withHoles.DirectionStandardErrorDegrees, 1e-9);
        Assert.Equal(61.0 / 64, withHoles.ObservedShare);
    }

    [Fact]
    public void A_channel_that_comes_back_is_used_again()
    {
        var whole = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        var broken = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        broken.Validity[3] = Validity.Invalid;

        var reading = WaveFrames.Read(Array, broken, whole);

        Assert.Equal(WaveFrames.Read(Array, whole).Statistic, reading.Statistic);
    }

    [Theory]
    [InlineData(12, true)]
    [InlineData(13, false)]
    public void A_fifth_of_the_channels_may_be_missing(int missing, bool isValid)
    {
        var frame = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        for (var i = 0; i < missing; i++) frame.Validity[i * 4] = Validity.Bridged;

        var reading = WaveFrames.Read(Array, frame);

        Assert.Equal(isValid, reading.IsValid);
        Assert.Equal(isValid, reading.Statistic > 5);
        Assert.Equal((64.0 - missing) / 64, reading.ObservedShare);
    }

    [Fact]
    public void Channels_without_amplitude_are_missing_and_a_frame_of_them_is_invalid()
    {
        var dead = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        (dead.Re[9], dead.Im[9]) = (0, 0);
        (dead.Re[10], dead.Im[10]) = (double.NaN, 1);

        Assert.Equal(62.0 / 64, WaveFrames.Read(Array, dead).ObservedShare);
        Assert.False(WaveFrames.Read(Array, WaveFrames.Frame(Array, (_, _) => 0, amplitude: (_, _) => 0)).IsValid);
    }

    [Fact]
    public void Channels_are_scaled_by_their_usual_amplitude()
    {
        var rms = Enumerable.Range(0, 64).Select(i => 0.2 + i % 7).ToArray();
        var plain = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        var scaled = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), Noise);
        for (var i = 0; i < 64; i++) (scaled.Re[i], scaled.Im[i]) = (scaled.Re[i] * rms[i], scaled.Im[i] * rms[i]);

        var reading = WaveFrames.Read(Array, Calibrated(Array, rms: rms), new PlanarOptions(), scaled);

        var expected = WaveFrames.Read(Array, Calibrated(Array), new PlanarOptions(), plain);
        Assert.Equal(expected.Statistic, reading.Statistic, 1e-9);
        Assert.Equal(expected.DirectionDegrees, reading.DirectionDegrees, 1e-9);
    }

    [Fact]
    public void The_same_phase_everywhere_has_no_direction()
    {
        var reading = WaveFrames.Read(Array, WaveFrames.Frame(Array, (_, _) => 0.3));

        Assert.Equal(WaveKind.NotResolved, reading.Kind);
        Assert.Equal(double.NegativeInfinity, reading.Statistic);
        Assert.Equal(1, reading.StandingShare, 1e-12);
        Assert.Equal(1, reading.UniformShare, 1e-12);
        Assert.Equal(double.NaN, reading.DirectionDegrees);
        Assert.Equal(double.NaN, reading.WavelengthMm);
    }

    [Fact]
    public void A_uniform_field_excludes_slow_waves_and_is_synchronous_only_where_those_of_interest_are_named()
    {
        Phasors[] frames =
        [
            WaveFrames.Frame(Array, (_, _) => 0.3, Noise, seed: 3),
            WaveFrames.Frame(Array, (_, _) => 0.3 + 2 * Math.PI * 0.04, Noise, index: 4, seed: 4),
        ];

        var plain = WaveFrames.Read(Array, frames);
        var named = Named(0.02);
        var tooFast = Named(50);

        Assert.Equal(WaveKind.NotResolved, plain.Kind);
        Assert.InRange(plain.ExcludedBelowMetresPerSecond, 0.05, 5);
        Assert.Equal(0, plain.SlownessLow);
        Assert.Equal(1 / plain.SlownessHigh, plain.ExcludedBelowMetresPerSecond, 1e-9);
        Assert.Equal(WaveKind.Synchronous, named.Kind);
        Assert.Equal(double.NaN, named.ExcludedBelowMetresPerSecond);
        Assert.Equal(WaveKind.NotResolved, tooFast.Kind);

        Reading Named(double slowest) => WaveFrames.Read(
            Array, Calibration.None("array", "alpha"), new PlanarOptions(SlowestWaveMetresPerSecond: slowest), frames);
    }

    [Fact]
    public void Noise_is_nothing_and_is_not_refined()
    {
        var reading = WaveFrames.Read(Array, WaveFrames.Frame(Array, (_, _) => 0, 1, (_, _) => 0));

        Assert.True(reading.IsValid);
        Assert.Equal(WaveKind.None, reading.Kind);
        Assert.True(reading.Statistic < 4.25);
        Assert.Equal(reading.Evidence.Planar, reading.Statistic);
        Assert.Equal(double.NaN, reading.GainOverUniform);
        Assert.Equal(double.NaN, reading.WaveVectorX);
    }

    [Fact]
    public void A_gate_that_is_not_passed_leaves_no_statistic()
    {
        var frame = WaveFrames.Frame(Array, WaveFrames.Plane(8, 70), 0.5);
        var usual = WaveFrames.Read(Array, frame);

        var first = Read(new PlanarOptions(GainOverUniform: Math.Min(usual.GainOverUniform + 1, 50)));
        var second = Read(new PlanarOptions(GainOutOfPhase: usual.GainOutOfPhase + 1));

        Assert.InRange(usual.GainOverUniform, 6, 49);
        Assert.True(usual.Statistic > 5);
        Assert.Equal(double.NegativeInfinity, first.Statistic);
        Assert.Equal(double.NegativeInfinity, second.Statistic);
        Assert.Equal(usual.Evidence.Planar, second.Evidence.Planar);
        Assert.NotEqual(WaveKind.Planar, first.Kind);
        Assert.NotEqual(WaveKind.Planar, second.Kind);

        Reading Read(PlanarOptions options) => WaveFrames.Read(Array, Calibration.None("array", "alpha"), options, frame);
    }

    [Fact]
    public void The_lowest_sector_threshold_says_from_where_on_frames_are_named_and_refined()
    {
        var frame = WaveFrames.Frame(Array, WaveFrames.Plane(3.1, 200), 1.2, seed: 2);
        var evidence = WaveFrames.Read(Array, frame).Evidence.Planar;

        var named = Read(evidence - 0.01);
        var refined = Read(evidence + 0.1 * Math.Abs(evidence));
        var neither = Read(evidence + 0.5 * Math.Abs(evidence));

        Assert.NotEqual(WaveKind.None, named.Kind);
        Assert.Equal(WaveKind.None, refined.Kind);
        Assert.False(double.IsNaN(refined.GainOverUniform));
        Assert.True(double.IsNaN(neither.GainOverUniform));

        Reading Read(double lowest) => WaveFrames.Read(
            Array,
            new Calibration
            {
                Patch = "array",
                Band = "alpha",
                Thresholds = [new KindThreshold(WaveKind.Planar, [lowest + 3, lowest, lowest + 1], 1, null, null)],
            },
            new PlanarOptions(),
            frame);
    }

    [Fact]
    public void Long_waves_have_a_slowness_interval_that_reaches_infinite_speed_and_short_ones_do_not()
    {
        var longWave = Read(22, 0.5);
        var shortWave = Read(3, 0.3);

        Assert.InRange(longWave.GainOverUniform, 6, 9);
        Assert.Equal(WaveKind.Planar, longWave.Kind);
        Assert.Equal(0, longWave.SlownessLow);
        Assert.True(longWave.SlownessHigh > 0);
        var slowness = 1000 / (3 * shortWave.LocalFrequencyHz);      // s/m of a wave of 3 mm
        Assert.InRange(slowness, shortWave.SlownessLow, shortWave.SlownessHigh);
        Assert.True(shortWave.SlownessLow > 0.8 * slowness && shortWave.SlownessHigh < 1.2 * slowness);

        static Reading Read(double wavelengthMm, double noise) => WaveFrames.Read(
            Array,
            WaveFrames.Frame(Array, WaveFrames.Plane(wavelengthMm, 40), noise, seed: 21),
            WaveFrames.Frame(Array, WaveFrames.Plane(wavelengthMm, 40, 2 * Math.PI * 0.04), noise, index: 4, seed: 22));
    }

    [Fact]
    public void A_wave_at_the_edge_of_what_the_pitch_resolves_is_marked()
    {
        Assert.True(WaveFrames.Read(Array, WaveFrames.Frame(Array, WaveFrames.Plane(1.45, 0))).IsAtResolutionLimit);
        Assert.False(WaveFrames.Read(Array, WaveFrames.Frame(Array, WaveFrames.Plane(1.7, 0))).IsAtResolutionLimit);
    }

    [Theory]
    [InlineData(25, 1, 25)]
    [InlineData(25, -1, 205)]
    [InlineData(90, -1, 270)]
    public void On_a_line_the_direction_is_one_of_two_without_an_error(double lineDegrees, int sense, double expected)
    {
        var layout = WaveFrames.Line(16, 0.1, lineDegrees, rotationDegrees: 30);

        var reading = WaveFrames.Read(layout, WaveFrames.Frame(layout, WaveFrames.Plane(2, lineDegrees + (sense > 0 ? 0 : 180)), 0.05));

        Assert.Equal(WaveKind.Planar, reading.Kind);
        Assert.Equal(expected + 30, reading.DirectionDegrees, 1e-9);
        Assert.Equal(double.NaN, reading.DirectionStandardErrorDegrees);
        Assert.Equal(2, reading.WavelengthMm, 0.1);
        var axis = (lineDegrees + 30) * Math.PI / 180;
        var along = reading.WaveVectorVarianceX + reading.WaveVectorVarianceY;
        Assert.True(along > 0);
        Assert.Equal(along * Math.Cos(axis) * Math.Sin(axis), reading.WaveVectorCovariance, 1e-12);
    }

    [Fact]
    public void Covariance_turns_with_the_view()
    {
        var turned = WaveFrames.Grid(4, 16, rotationDegrees: 90);
        var plain = WaveFrames.Grid(4, 16);

        var expected = WaveFrames.Read(plain, WaveFrames.Frame(plain, WaveFrames.Plane(4, 30), Noise));
        var reading = WaveFrames.Read(turned, WaveFrames.Frame(plain, WaveFrames.Plane(4, 30), Noise));

        Assert.Equal(expected.WaveVectorVarianceX, reading.WaveVectorVarianceY, 1e-12);
        Assert.Equal(expected.WaveVectorVarianceY, reading.WaveVectorVarianceX, 1e-12);
        Assert.Equal(-expected.WaveVectorCovariance, reading.WaveVectorCovariance, 1e-12);
        Assert.Equal(expected.WaveVectorX, reading.WaveVectorY, 1e-12);
        Assert.Equal(expected.DirectionStandardErrorDegrees, reading.DirectionStandardErrorDegrees, 1e-9);
    }

    [Theory]
    [InlineData(1000, 0, 4)]
    [InlineData(512, 0, 2)]
    [InlineData(100, 0, 1)]
    [InlineData(1000, 10, 10)]
    [InlineData(100, 1, 1)]
    public void Frames_come_250_times_a_second_or_as_asked(double rateHz, double everyMs, int expected)
    {
        var estimator = new PlanarEstimator(new PlanarOptions(EveryMs: everyMs));

        Assert.Equal(expected, estimator.Prepare(
            WaveFrames.Format(Array, rateHz), WaveFrames.Alpha, Array, Calibration.None("array", "alpha")));
    }

    [Fact]
    public void Calibrations_of_another_array_are_refused()
    {
        Refused(Calibrated(Array, rms: [1, 2, 3]));
        Refused(Calibrated(Array, rms: [.. Enumerable.Repeat(1.0, 63), 0]));
        Refused(Calibrated(WaveFrames.Grid(4, 4)));

        static void Refused(Calibration calibration) => Assert.Throws<RefusedException>(
            () => new PlanarEstimator().Prepare(WaveFrames.Format(Array), WaveFrames.Alpha, Array, calibration));
    }

    private static Calibration Calibrated(Layout layout, Layout? aperture = null, double[]? rms = null)
    {
        var good = layout.GoodChannels().Select(channel => layout.Electrodes[channel]).ToArray();
        var reach = 0.5 * new ArrayGeometry(aperture ?? layout).ApertureMm;
        return new Calibration
        {
            Patch = "array",
            Band = "alpha",
            ChannelRms = rms ?? [],
            Noise = new NoiseModel(
                [.. good.SelectMany(a => good.Select(b => 0.95 * Math.Exp(-Math.Sqrt(Math.Pow(a.XMm - b.XMm, 2) + Math.Pow(a.YMm - b.YMm, 2)) / reach)
                    + (a == b ? 0.05 : 0)))],
                0.01, "fitted", double.NaN),
        };
    }
}
