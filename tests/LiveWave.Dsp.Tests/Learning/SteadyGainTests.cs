using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public sealed class SteadyGainTests
{
    private const double Relative = 1e-8;

    public static TheoryData<string, string> Models
    {
        get
        {
            var models = new TheoryData<string, string>();
            foreach (var one in PhaseCase.All()) models.Add(one.Name, one.Kind);
            return models;
        }
    }

    // Reference of the phase study, sections 3 and 5 (numpy 1.24.2).
    [Theory]
    [MemberData(nameof(Models))]
    public void Gain_and_covariance_agree_with_the_reference(string name, string kind)
    {
        var expected = PhaseCase.Of(name, kind);

        var steady = SteadyGain.Of(expected.Model);

        Assert.Equal(expected.InnovationVariance, steady.InnovationVariance, Relative * expected.InnovationVariance);
        for (var state = 0; state < expected.Gain.Length; state++)
        {
            AssertClose(expected.Gain[state], steady.Gain[state]);
            AssertClose(expected.FilteredDiagonal[state], steady.FilteredCovariance[state, state]);
            AssertClose(expected.PredictedDiagonal[state], steady.PredictedCovariance[state, state]);
        }
    }

    [Theory]
    [MemberData(nameof(Models))]
    public void The_spread_at_every_horizon_agrees_with_the_reference(string name, string kind)
    {
        var expected = PhaseCase.Of(name, kind);

        var ahead = SteadyGain.Of(expected.Model).VarianceAhead(expected.HorizonSamples[^1]);

        for (var i = 0; i < expected.HorizonSamples.Length; i++)
        {
            AssertClose(expected.VariancePerAxis[i], ahead[expected.HorizonSamples[i]]);
        }
    }

    [Theory]
    [MemberData(nameof(Models))]
    public void The_covariance_solves_the_steady_state_equation(string name, string kind)
    {
        var model = PhaseCase.Of(name, kind).Model;
        var predicted = SteadyGain.Of(model).PredictedCovariance;
        var filtered = SteadyGain.Of(model).FilteredCovariance;
        var oscillators = model.Oscillators.Count;

        // Oscillators only: rotate and shrink both sides of each block, add the drive.
        for (var j = 0; j < oscillators; j++)
        {
            var (re, im) = (model.Oscillators[j].PoleRe, model.Oscillators[j].PoleIm);
            var rotation = new RealMatrix(2, 2) { [0, 0] = re, [0, 1] = -im, [1, 0] = im, [1, 1] = re };
            var block = new RealMatrix(2, 2);
            for (var i = 0; i < 4; i++) block[i / 2, i % 2] = filtered[(2 * j) + (i / 2), (2 * j) + (i % 2)];

            var moved = rotation * block * rotation.Transposed();

            AssertClose(moved[0, 0] + model.Oscillators[j].DriveVariance, predicted[2 * j, 2 * j]);
            AssertClose(moved[1, 1] + model.Oscillators[j].DriveVariance, predicted[(2 * j) + 1, (2 * j) + 1]);
        }
    }

    [Fact]
    public void Far_ahead_nothing_but_the_rhythms_own_variance_is_left()
    {
        var steady = SteadyGain.Of(PhaseModels.Alpha);

        Assert.Equal(1, steady.StationaryVariance, 1e-12);
        Assert.Equal(steady.StationaryVariance, steady.VarianceAhead(10_000)[^1], 1e-9);
    }

    [Fact]
    public void A_model_without_a_target_is_refused()
    {
        var neighbour = PhaseModels.Alpha.Oscillators[0] with { IsTarget = false };

        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { Oscillators = [neighbour] }));
        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { Oscillators = [] }));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-0.1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void White_noise_that_is_none_is_refused(double variance) =>
        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { WhiteVariance = variance }));

    [Theory]
    [InlineData(1, 0)]
    [InlineData(0.8, 0.6)]
    [InlineData(double.NaN, 0)]
    public void A_pole_that_is_not_inside_the_unit_circle_is_refused(double re, double im) =>
        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { Oscillators = [new(re, im, 0.1, true)] }));

    [Theory]
    [InlineData(1)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    public void A_background_that_does_not_decay_is_refused(double pole) =>
        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { Background = [new(pole, 0.1)] }));

    [Theory]
    [InlineData(-1e-9)]
    [InlineData(double.NaN)]
    public void A_drive_that_is_no_variance_is_refused(double variance) =>
        Assert.Throws<RefusedException>(() => SteadyGain.Of(PhaseModels.Alpha with { Background = [new(0.5, variance)] }));

    private static void AssertClose(double expected, double actual) => Assert.Equal(expected, actual, Relative * Math.Abs(expected));
}
