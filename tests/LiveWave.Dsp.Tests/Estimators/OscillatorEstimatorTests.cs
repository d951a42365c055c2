using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

public sealed class OscillatorEstimatorTests
{
    private static readonly Band Band = new("alpha", 8, 12, [0, 20]);

    private readonly OscillatorEstimator _estimator = new();
    private readonly Phasors _now = new(2);
    private int _row;

    [Fact]
    public void The_start_is_invalid_for_a_second()
    {
        Prepare(PhaseModels.Alpha);

        Give(1000);
        Assert.Equal(Validity.Invalid, _now.Validity[0]);
        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Fact]
    public void A_gap_beyond_fifty_milliseconds_is_over_with_the_first_sample()
    {
        Prepare(PhaseModels.Alpha);
        Give(1001);

        Lose(50);
        Assert.Equal(Validity.Bridged, _now.Validity[0]);
        Lose(1);
        Assert.Equal(Validity.Invalid, _now.Validity[0]);
        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Fact]
    public void After_more_than_a_second_a_channel_begins_anew()
    {
        var fresh = new OscillatorEstimator();
        Prepare(PhaseModels.Alpha);
        fresh.Prepare(Signals.Format(1000, 2), Band, PhaseModels.Calibration(PhaseModels.Alpha));
        Give(2000);
        Lose(1001);
        Assert.Equal(0, _now.Re[0]);

        var expected = new Phasors(2);
        for (var row = 0; row < 300; row++)
        {
            fresh.Step(Sample(_row), expected);
            Give(1);
            Assert.Equal(expected.Re[0], _now.Re[0]);
            Assert.Equal(expected.Im[0], _now.Im[0]);
            Assert.Equal(Validity.Invalid, _now.Validity[0]);
        }

        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Fact]
    public void The_spread_grows_with_horizon_and_gap_and_with_the_square_of_the_scale()
    {
        Prepare(PhaseModels.Alpha, 2, 10);
        var ahead = SteadyGain.Of(PhaseModels.Alpha).VarianceAhead(40);
        var then = new Phasors(2);
        Give(100);
        Assert.Equal(4 * ahead[0], _now.VariancePerAxis[0]);
        Assert.Equal(100 * ahead[0], _now.VariancePerAxis[1]);

        Lose(15);
        _estimator.Predict(20, then);

        Assert.Equal(4 * ahead[15], _now.VariancePerAxis[0]);
        Assert.Equal(4 * ahead[35], then.VariancePerAxis[0]);
        Assert.Equal(100 * ahead[20], then.VariancePerAxis[1]);
    }

    [Fact]
    public void The_spread_of_a_channel_long_gone_is_that_of_the_rhythm_itself()
    {
        Prepare(PhaseModels.Alpha, 2, 10);
        Give(100);

        Lose(1500);

        Assert.Equal(4 * SteadyGain.Of(PhaseModels.Alpha).StationaryVariance, _now.VariancePerAxis[0]);
        Assert.Equal(4.0, _now.VariancePerAxis[0], 1e-9);
    }

    [Fact]
    public void Without_scales_the_spread_is_not_known()
    {
        Prepare(PhaseModels.Alpha);

        Give(100);

        Assert.All(_now.VariancePerAxis.ToArray(), variance => Assert.True(double.IsNaN(variance)));
    }

    [Fact]
    public void A_scaled_channel_has_a_scaled_phasor()
    {
        Prepare(PhaseModels.Alpha);

        Give(500);

        Assert.Equal(-4 * _now.Re[0], _now.Re[1], 1e-12);
        Assert.Equal(-4 * _now.Im[0], _now.Im[1], 1e-12);
    }

    [Fact]
    public void A_dead_electrode_does_not_leave_subnormal_states_behind()
    {
        Prepare(PhaseModels.Alpha);
        Give(100);

        // Dead at zero: nothing but decay is left.
        double[] dead = [0, 0];
        for (var row = 0; row < 500_000; row++) _estimator.Step(dead, _now);

        Assert.Equal(0, _now.Re[0]);
        Assert.Equal(0, _now.Im[0]);
    }

    [Fact]
    public void A_horizon_that_was_not_declared_is_an_error()
    {
        Prepare(PhaseModels.Alpha);

        Assert.Throws<ArgumentOutOfRangeException>(() => _estimator.Predict(19, _now));
    }

    [Fact]
    public void A_model_of_another_rate_is_refused_with_both_rates()
    {
        var refused = Assert.Throws<RefusedException>(() => Prepare(PhaseModels.Alpha with { RateHz = 512 }));

        Assert.Contains("512 Hz", refused.Message, StringComparison.Ordinal);
        Assert.Contains("1000 Hz", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_calibration_without_a_model_or_with_scales_of_other_channels_is_refused()
    {
        Assert.Throws<RefusedException>(() => Prepare(null));
        Assert.Throws<RefusedException>(() => Prepare(PhaseModels.Alpha, 1, 2, 3));
    }

    private static double[] Sample(int row)
    {
        var value = Math.Cos(0.063 * row) + (0.3 * Math.Sin(0.31 * row)) + 5;
        return [value, -4 * value];
    }

    private void Prepare(PhaseModel? model, params double[] scales) =>
        _estimator.Prepare(Signals.Format(1000, 2), Band, PhaseModels.Calibration(model, scales));

    private void Give(int rows)
    {
        for (var row = 0; row < rows; row++) _estimator.Step(Sample(_row++), _now);
    }

    // The first channel is lost, the second goes on.
    private void Lose(int rows)
    {
        for (var row = 0; row < rows; row++) _estimator.Step([double.NaN, Sample(_row++)[1]], _now);
    }
}
