using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Events of silent scenes, read back with tools that do not know how they were made.</summary>
public sealed class SceneEventTests
{
    /// <summary>A delay is a lag of 360·f·τ degrees: 16 ms at 11 Hz = 63.36 degrees.</summary>
    [Theory]
    [InlineData(11, 16, 63.36)]
    [InlineData(18, 5, 32.4)]
    [InlineData(7, 40, 100.8)]
    public void A_delay_between_two_sites_is_the_lag_that_it_should_be(double frequencyHz, double delayMs, double lagDegrees)
    {
        var patch = new ScenePatch("quill", new Layout([new("a", 0, 0), new("b", 1.6, 0)]));
        var wave = Scenery.Wave(WaveKind.Planar, frequencyHz) with { DirectionDegrees = 0, SpeedMetresPerSecond = 1.6 / delayMs };

        var at = Scenery.Demodulated(Scenery.Silent(2, patch, wave), frequencyHz);

        var lag = Scenery.Wrapped(at[0].Phase - at[1].Phase) * 180 / Math.PI;
        Assert.Equal(lagDegrees, lag, 0.1);
        Assert.Equal(100, at[0].Modulus, 0.01);
    }

    [Theory]
    [InlineData(0, 4)]
    [InlineData(135, 3)]
    [InlineData(301.5, 5)]
    public void A_planar_wave_is_read_with_the_direction_wavelength_and_speed_that_were_asked_for(double degrees, double wavelengthMm)
    {
        var wave = Scenery.Wave(WaveKind.Planar) with { DirectionDegrees = degrees, WavelengthMm = wavelengthMm };

        var reading = WaveFrames.Read(Scenery.Grid.Layout, Frames(Scenery.Demodulated(Scenery.Silent(2, null, wave), 11)));

        Assert.Equal(WaveKind.Planar, reading.Kind);
        Assert.Equal(0, Scenery.Wrapped((reading.DirectionDegrees - degrees) * Math.PI / 180) * 180 / Math.PI, 0.1);
        Assert.Equal(wavelengthMm, reading.WavelengthMm, 0.01);
        using var feed = new SceneFeed(Scenery.Silent(2, null, wave));
        Assert.Equal(11 * wavelengthMm / 1000, feed.Truth[0].SpeedMetresPerSecond, 1e-12);
    }

    /// <summary>Counter-clockwise motion has phase winding −1 along a counter-clockwise loop.</summary>
    [Theory]
    [InlineData(WaveKind.RotatingCounterClockwise, -1)]
    [InlineData(WaveKind.RotatingClockwise, 1)]
    public void A_rotating_wave_winds_once_about_its_centre(WaveKind kind, int winding)
    {
        var at = Scenery.Demodulated(Scenery.Silent(2, null, Scenery.Wave(kind)), 11);

        var ring = Scenery.Grid.Layout.Electrodes.Index()
            .Where(e => Math.Abs(Math.Max(Math.Abs(e.Item.XMm - 1.4), Math.Abs(e.Item.YMm - 1.4)) - 0.6) < 1e-6)
            .OrderBy(e => Math.Atan2(e.Item.YMm - 1.4, e.Item.XMm - 1.4))
            .Select(e => at[e.Index].Phase)
            .ToArray();
        var turned = ring.Zip([.. ring[1..], ring[0]], (one, next) => Scenery.Wrapped(next - one)).Sum();
        Assert.Equal(12, ring.Length);
        Assert.Equal(winding, turned / (2 * Math.PI), 1e-6);
    }

    [Theory]
    [InlineData(WaveKind.Expanding, -1)]
    [InlineData(WaveKind.Contracting, 1)]
    public void Phase_falls_away_from_the_centre_of_an_expanding_wave_and_rises_from_that_of_a_contracting_one(WaveKind kind, int sign)
    {
        var wave = Scenery.Wave(kind) with { WavelengthMm = 4, CentreXMm = 0.4, CentreYMm = 0.8 };

        var at = Scenery.Demodulated(Scenery.Silent(2, null, wave), 11);

        var electrodes = Scenery.Grid.Layout.Electrodes;
        var centre = electrodes.Index().First(e => Math.Abs(e.Item.XMm - 0.4) + Math.Abs(e.Item.YMm - 0.8) < 1e-9).Index;
        Assert.All(Enumerable.Range(0, at.Length), i =>
        {
            var distance = double.Hypot(electrodes[i].XMm - 0.4, electrodes[i].YMm - 0.8);
            Assert.Equal(0, Scenery.Wrapped(at[i].Phase - at[centre].Phase - (sign * 2 * Math.PI * distance / 4)), 1e-4);
        });
    }

    [Fact]
    public void A_standing_wave_has_bellies_and_nodes_and_no_lag_but_half_a_cycle()
    {
        var wave = Scenery.Wave(WaveKind.Standing) with { DirectionDegrees = 0, WavelengthMm = 4, CentreXMm = 0, CentreYMm = 0 };

        var at = Scenery.Demodulated(Scenery.Silent(2, null, wave), 11);

        var height = at.Max(one => one.Modulus);
        Assert.All(Scenery.Grid.Layout.Electrodes.Index(), e =>
        {
            var pattern = Math.Cos(2 * Math.PI * e.Item.XMm / 4);
            Assert.Equal(height * Math.Abs(pattern), at[e.Index].Modulus, 0.01);
            if (Math.Abs(pattern) > 0.1) Assert.Equal(pattern > 0 ? 1 : -1, Math.Cos(at[e.Index].Phase - at[0].Phase) * Math.Sign(Math.Cos(2 * Math.PI * 0.4 / 4)), 1e-6);
        });
        Assert.Equal(100, Rms(at), 0.01);
    }

    [Theory]
    [InlineData(WaveKind.Synchronous, SceneShape.Focus, 1)]
    [InlineData(WaveKind.InPhase, SceneShape.Focus, 1)]
    [InlineData(WaveKind.InPhase, SceneShape.EdgeFocus, 1)]
    [InlineData(WaveKind.InPhase, SceneShape.Ramp, 1)]
    [InlineData(WaveKind.InPhase, SceneShape.TwoPoles, 2)]
    public void A_field_in_phase_has_no_lag_and_the_power_that_was_asked_for(WaveKind kind, SceneShape shape, int signs)
    {
        var direction = kind == WaveKind.InPhase && shape != SceneShape.Focus ? 70 : double.NaN;
        var at = Scenery.Demodulated(Scenery.Silent(2, null, Scenery.Wave(kind) with { Shape = shape, DirectionDegrees = direction }), 11);

        Assert.Equal(100, Rms(at), 0.01);
        Assert.All(at, one => Assert.Equal(0, Math.Sin(one.Phase - at[0].Phase), 1e-4));
        Assert.Equal(signs, at.Select(one => Math.Cos(one.Phase - at[0].Phase) > 0).Distinct().Count());
        var spread = at.Max(one => one.Modulus) / at.Min(one => one.Modulus);
        Assert.True(kind == WaveKind.Synchronous ? spread < 1.001 : spread > 1.3, $"spread {spread}");
    }

    [Fact]
    public void A_series_is_drawn_by_lot_within_its_spreads_and_stands_in_the_truth()
    {
        var series = Scenery.Wave(WaveKind.Planar, 18) with
        {
            OnsetSeconds = 1,
            DurationSeconds = 0.4,
            DirectionDegrees = 350,
            DirectionSpreadDegrees = 20,
            FrequencySpreadHz = 2,
            WavelengthMm = 4,
            Repeats = 40,
            EverySeconds = 1.2,
            EverySpreadSeconds = 0.1,
        };
        using var feed = new SceneFeed(Scenery.Silent(60, null, series));

        Assert.Equal(40, feed.Truth.Count);
        Assert.All(feed.Truth.Index(), one =>
        {
            Assert.Equal(1 + (1.2 * one.Index), one.Item.OnsetSeconds, 0.1);
            Assert.InRange(one.Item.FrequencyHz, 16, 20);
            Assert.InRange(one.Item.DirectionDegrees, 0, 360);
            Assert.InRange(Math.Abs(Scenery.Wrapped((one.Item.DirectionDegrees - 350) * Math.PI / 180)), 0, 20.01 * Math.PI / 180);
        });
        Assert.InRange(feed.Truth.Select(one => one.FrequencyHz).Distinct().Count(), 30, 40);
    }

    private static double Rms((double Modulus, double Phase)[] at) => Math.Sqrt(at.Average(one => one.Modulus * one.Modulus));

    private static Phasors Frames((double Modulus, double Phase)[] at)
    {
        var phasors = new Phasors(at.Length) { At = new RowInstant(0, 0, 0) };
        for (var i = 0; i < at.Length; i++)
        {
            phasors.Re[i] = at[i].Modulus * Math.Cos(at[i].Phase);
            phasors.Im[i] = at[i].Modulus * Math.Sin(at[i].Phase);
        }

        phasors.Validity.Fill(Validity.Observed);
        return phasors;
    }
}
