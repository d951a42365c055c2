using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

/// <summary>The band is 4 Hz wide: the filter settles in 3/4 s.</summary>
public sealed class BandpassQuadratureEstimatorTests
{
    private static readonly Band Band = new("alpha", 8, 12, [0, 20]);

    private readonly Phasors _now = new(1);
    private BandpassQuadratureEstimator _estimator = new();
    private int _row;

    [Theory]
    [InlineData(true, 1000)]
    [InlineData(false, 750)]
    public void The_start_is_invalid_until_filter_and_offset_block_have_settled(bool dcBlock, int rows)
    {
        Prepare(new BandpassQuadratureEstimator(dcBlock: dcBlock));

        Give(rows);
        Assert.Equal(Validity.Invalid, _now.Validity[0]);
        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Fact]
    public void A_short_gap_is_bridged()
    {
        Prepare(new BandpassQuadratureEstimator());
        Give(1001);

        Lose(50);
        Assert.Equal(Validity.Bridged, _now.Validity[0]);
        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Theory]
    [InlineData(51)]
    [InlineData(1001)]
    public void After_a_longer_gap_the_filter_settles_first(int gap)
    {
        Prepare(new BandpassQuadratureEstimator());
        Give(1001);
        Lose(gap);
        Assert.Equal(Validity.Invalid, _now.Validity[0]);

        Give(750);
        Assert.Equal(Validity.Invalid, _now.Validity[0]);
        Give(1);
        Assert.Equal(Validity.Observed, _now.Validity[0]);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    public void The_filters_own_phase_and_gain_are_removed_at_every_order(int order)
    {
        Prepare(new BandpassQuadratureEstimator(order));

        Give(8000);

        var radians = 2 * Math.PI * Band.CentreHz * (_row - 1) / 1000;
        Assert.Equal(Math.Cos(radians), _now.Re[0], 0.01);
        Assert.Equal(Math.Sin(radians), _now.Im[0], 0.01);
    }

    [Fact]
    public void A_prediction_turns_on_at_the_centre_frequency()
    {
        Prepare(new BandpassQuadratureEstimator());
        Give(500);
        var then = new Phasors(1);

        _estimator.Predict(20, then);

        var (sin, cos) = Math.SinCos(2 * Math.PI * Band.CentreHz * 20 / 1000);
        Assert.Equal((cos * _now.Re[0]) - (sin * _now.Im[0]), then.Re[0], 1e-12);
        Assert.Equal((sin * _now.Re[0]) + (cos * _now.Im[0]), then.Im[0], 1e-12);
    }

    [Fact]
    public void Its_spread_is_not_known()
    {
        Prepare(new BandpassQuadratureEstimator());
        _now.VariancePerAxis.Fill(1);

        Give(1);

        Assert.True(double.IsNaN(_now.VariancePerAxis[0]));
    }

    [Fact]
    public void Orders_and_horizons_outside_what_was_said_are_errors()
    {
        Prepare(new BandpassQuadratureEstimator());

        Assert.Throws<ArgumentOutOfRangeException>(() => new BandpassQuadratureEstimator(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => new BandpassQuadratureEstimator(9));
        Assert.Throws<ArgumentOutOfRangeException>(() => _estimator.Predict(19, _now));
        Assert.Throws<RefusedException>(() => new BandpassQuadratureEstimator().Prepare(
            Signals.Format(1000, 1), Band with { HorizonSamples = [0, -1] }, Calibration.None("A", "alpha")));
    }

    private void Prepare(BandpassQuadratureEstimator estimator)
    {
        _estimator = estimator;
        _estimator.Prepare(Signals.Format(1000, 1), Band, Calibration.None("A", "alpha"));
    }

    private void Give(int rows)
    {
        for (var row = 0; row < rows; row++) _estimator.Step([Math.Cos(2 * Math.PI * Band.CentreHz * _row++ / 1000)], _now);
    }

    private void Lose(int rows)
    {
        for (var row = 0; row < rows; row++, _row++) _estimator.Step([double.NaN], _now);
    }
}
