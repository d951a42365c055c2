using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Acceptance line 1 of our wave study: 1e-6, wave vectors relative to the longest.</summary>
public class PlanarGoldenTests
{
    private const double Tolerance = 1e-6;

    public static IEnumerable<TheoryDataRow<string>> Frames() => WaveGolden.Names("frames");

    [Theory]
    [MemberData(nameof(Frames))]
    public void The_bank_finds_evidence_and_best_wave_vector_of_the_study(string id)
    {
        var expected = WaveGolden.Case("frames", id);
        var (frame, geometry, bank) = WaveGolden.Whitened(expected);

        bank.Compare(frame);

        var (first, second) = geometry.HalfGrid[bank.Best];
        if (bank.BestIsMinus) (first, second) = (-first, -second);
        AssertWaveVector(expected.Numbers("k_grid"), geometry.ToPlane(first, second), geometry);
        AssertClose(expected.Number("E_plane"), bank.Evidence);
        AssertClose(expected.Number("lambda_max"), Math.Max(bank.Plus[bank.Best], bank.Minus[bank.Best]));
        AssertClose(expected.Number("S2"), frame.StandingShare);
        AssertClose(Math.Pow(expected.Number("R_uniform"), 2), frame.UniformShare);
    }

    [Theory]
    [MemberData(nameof(Frames))]
    public void The_fit_from_the_best_of_the_bank_is_that_of_the_study(string id)
    {
        var expected = WaveGolden.Case("frames", id);
        var (frame, geometry, bank) = WaveGolden.Whitened(expected);
        bank.Compare(frame);
        var fit = new PlaneFit(geometry);
        var (first, second) = geometry.HalfGrid[bank.Best];
        if (bank.BestIsMinus) (first, second) = (-first, -second);

        fit.Template.Hold(frame, first, second);
        fit.Refine(frame);
        fit.Spread(frame);

        AssertWaveVector(expected.Numbers("k_gls"), geometry.ToPlane(fit.Template.First, fit.Template.Second), geometry);
        AssertClose(expected.Number("noise_scale"), (frame.Energy - fit.Template.Explained) / (frame.ObservedCount - 2));
        var rows = expected.GetProperty("cov_k_unit_noise");
        if (geometry.Rank == 1)
        {
            AssertRelative(rows[0][0].GetDouble() + rows[1][1].GetDouble(), fit.VarianceFirst);
            return;
        }

        AssertRelative(rows[0][0].GetDouble(), fit.VarianceFirst);
        AssertRelative(rows[1][1].GetDouble(), fit.VarianceSecond);
        Assert.Equal(rows[0][1].GetDouble(), fit.Covariance, Tolerance * Math.Sqrt(fit.VarianceFirst * fit.VarianceSecond));
    }

    [Theory]
    [MemberData(nameof(Frames))]
    public void A_reading_says_what_the_study_says(string id)
    {
        var expected = WaveGolden.Case("frames", id);

        var reading = WaveGolden.Read(expected, threshold: -100);

        AssertClose(expected.Number("E_plane"), reading.Evidence.Planar);
        if (expected.TryGetProperty("dL", out var gain))
        {
            AssertClose(gain.GetDouble(), reading.GainOverUniform);
            AssertClose(expected.Number("E_sync"), reading.Evidence.Synchronous);
        }
    }

    // The study's standard error belongs to the fit from the bank, a reading to the better of two fits: frames where that is one.
    [Theory]
    [InlineData("plane-g8_0.4c-2")]
    [InlineData("plane-g10_0.4c-2")]
    [InlineData("plane-irr40-1")]
    [InlineData("two-planes-dominant-6dB")]
    [InlineData("plane-with-bad-channels")]
    public void The_standard_error_of_the_direction_is_that_of_the_study(string id)
    {
        var expected = WaveGolden.Case("frames", id);

        var reading = WaveGolden.Read(expected, threshold: -100);

        AssertClose(expected.Number("se_direction_deg"), reading.DirectionStandardErrorDegrees);
    }

    [Theory]
    [InlineData("plane-g8_0.4c-0", WaveKind.Planar)]
    [InlineData("plane-g8_0.4c-1", WaveKind.Planar)]
    [InlineData("plane-g8_0.4c-2", WaveKind.Planar)]
    [InlineData("plane-lin16_0.1-0", WaveKind.Planar)]
    [InlineData("plane-with-bad-channels", WaveKind.Planar)]
    [InlineData("two-planes-dominant-6dB", WaveKind.Planar)]
    [InlineData("standing-nodes-40dB", WaveKind.Standing)]
    [InlineData("sync-40dB", WaveKind.NotResolved)]
    [InlineData("plane-g4x16_1-1", WaveKind.None)]
    [InlineData("rotating-ccw-6dB", WaveKind.None)]
    [InlineData("noise-only", WaveKind.None)]
    public void Frames_at_a_threshold_of_five_are_called_what_they_are(string id, WaveKind kind)
    {
        Assert.Equal(kind, WaveGolden.Read(WaveGolden.Case("frames", id), threshold: 5).Kind);
    }

    private static void AssertWaveVector(double[] expected, (double X, double Y) actual, ArrayGeometry geometry)
    {
        Assert.Equal(expected[0], actual.X, Tolerance * geometry.WaveNumberLimit);
        Assert.Equal(expected[1], actual.Y, Tolerance * geometry.WaveNumberLimit);
    }

    private static void AssertClose(double expected, double actual) =>
        Assert.Equal(expected, actual, Tolerance * Math.Max(1, Math.Abs(expected)));

    private static void AssertRelative(double expected, double actual) => Assert.Equal(expected, actual, Tolerance * Math.Abs(expected));
}
