using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Backgrounds, measured; seeds are fixed, and tolerances three standard errors or more.</summary>
public sealed class SceneNoiseTests
{
    private static readonly ScenePatch Line = new("quill", new Layout([.. Enumerable.Range(0, 6).Select(i => new Electrode($"e{i}", 0.4 * i, 0))]));

    private static readonly int[] Octaves = [4, 8, 16, 32, 64, 128];

    [Theory]
    [InlineData(0.6)]
    [InlineData(1.2)]
    [InlineData(1.7)]
    public void The_bank_of_processes_is_a_power_law_to_a_quarter_of_a_decibel(double exponent)
    {
        var bank = new FirstOrderBank(exponent, 0.5, 1000);

        double Off(double hz) => bank.Power(hz) * Math.Pow((hz * hz) + 0.25, 0.5 * exponent);
        for (var hz = 0.5; hz < 250; hz *= 1.1) Assert.Equal(0, 10 * Math.Log10(Off(hz) / Off(16)), 0.25);
        Assert.Equal(1, bank.Shares.Sum(), 1e-12);
    }

    [Fact]
    public void The_spectrum_falls_as_asked()
    {
        var (rows, _) = Scenery.Play(Scenery.Silent(60, Line) with { Background = new() { ContactMicrovolts = 10 } });

        var slopes = Enumerable.Range(0, 6).Select(channel =>
        {
            var density = Scenery.Density(rows, channel, 1000, 128);
            var points = Octaves.Select(hz => (X: Math.Log(hz), Y: Math.Log(density[hz]))).ToArray();
            var (meanX, meanY) = (points.Average(p => p.X), points.Average(p => p.Y));
            return points.Sum(p => (p.X - meanX) * (p.Y - meanY)) / points.Sum(p => (p.X - meanX) * (p.X - meanX));
        });

        Assert.Equal(-1.2, slopes.Average(), 0.06);
    }

    /// <summary>Of differences from row to row: as many independent ones as rows, and the same correlation in space.</summary>
    [Fact]
    public void Channels_are_correlated_by_distance_and_by_their_common_reference()
    {
        var background = new SceneBackground { LocalMicrovolts = 8, LocalLengthMm = 1, CommonMicrovolts = 4, ContactMicrovolts = 3, SensorMicrovolts = 0 };
        var (rows, _) = Scenery.Play(Scenery.Silent(20, Line) with { Background = background });

        for (var i = 0; i < 6; i++)
        {
            for (var j = 0; j < i; j++)
            {
                var expected = ((64 * Math.Exp(-0.4 * (i - j))) + 16) / (64 + 16 + 9);
                Assert.Equal(expected, Correlation(rows, i, j), 0.035);
            }
        }
    }

    [Fact]
    public void Power_in_the_band_is_what_SNRs_refer_to()
    {
        var scene = Scenery.Silent(60, Line) with
        {
            BandLowHz = 14,
            BandHighHz = 22,
            Background = new() { ContactMicrovolts = 10, SensorMicrovolts = 4 },
        };
        var (rows, _) = Scenery.Play(scene);
        using var feed = new SceneFeed(scene);

        // Bins of 1 Hz: the two on the edges count half.
        var power = Enumerable.Range(0, 6).Average(channel =>
        {
            var density = Scenery.Density(rows, channel, 1000, 22);
            return 2 * (density[15..22].Sum() + (0.5 * (density[14] + density[22])));
        });
        Assert.Equal(1, power / (feed.BandMicrovolts * feed.BandMicrovolts), 0.05);
    }

    [Fact]
    public void The_ongoing_rhythm_has_its_line_and_no_lag()
    {
        var scene = Scenery.Silent(100, Line) with { Rhythm = new(18, 4, 10), BandLowHz = 10, BandHighHz = 26 };
        var (rows, _) = Scenery.Play(scene);
        using var feed = new SceneFeed(scene);

        var power = Enumerable.Range(0, 6).Average(channel => 2 * Scenery.Density(rows, channel, 1000, 26)[10..27].Sum());
        Assert.Equal(1, power / (feed.BandMicrovolts * feed.BandMicrovolts), 0.15);
        Assert.All(Enumerable.Range(1, 5), channel => Assert.Equal(1, Correlation(rows, 0, channel), 1e-6));
        var density = Scenery.Density(rows, 0, 1000, 30);
        Assert.InRange(Array.IndexOf(density, density.Max()), 16, 20);
    }

    [Theory]
    [InlineData(6)]
    [InlineData(-3)]
    public void An_SNR_gives_the_amplitude_that_has_that_power_over_the_background_in_the_band(double decibels)
    {
        var wave = Scenery.Wave(WaveKind.Synchronous) with { SnrDecibels = decibels, AmplitudeMicrovolts = double.NaN };
        using var feed = new SceneFeed(Scenery.Silent(2, null, wave) with { BandLowHz = 8, BandHighHz = 13, Background = new() { SensorMicrovolts = 7 } });

        // White noise: E|n|² = 2·7²·(2·5/1000).
        Assert.Equal(2 * 49 * 0.01 * Math.Pow(10, decibels / 10), feed.Truth[0].AmplitudeMicrovolts * feed.Truth[0].AmplitudeMicrovolts, 1e-9);
        Assert.Equal(decibels, feed.Truth[0].SnrDecibels, 1e-9);
    }

    private static double Correlation(double[][] rows, int one, int other)
    {
        var (a, b, c) = (0.0, 0.0, 0.0);
        for (var i = 1; i < rows.Length; i++)
        {
            var (x, y) = (rows[i][one] - rows[i - 1][one], rows[i][other] - rows[i - 1][other]);
            (a, b, c) = (a + (x * x), b + (y * y), c + (x * y));
        }

        return c / Math.Sqrt(a * b);
    }
}
