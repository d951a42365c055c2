using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

/// <summary>The recursions against the reference of the phase study (SciPy 1.10.1), sections 3, 5 and 8.</summary>
public sealed class PhaseGoldenTests
{
    public static TheoryData<string> Cases => ["alpha-1k", "alpha-neighbour-1k", "beta-512"];

    [Theory]
    [MemberData(nameof(Cases))]
    public void The_offset_block_agrees(string name)
    {
        var (vectors, model) = (new PhaseVectors(name), PhaseCase.Of(name, "fitted"));
        var offset = new OffsetBlock(model.Band, model.RateHz, 1);
        var (row, blocked) = (new double[RowLength.Padded(1)], new double[RowLength.Padded(1)]);
        offset.Settle(0, vectors.Samples[0]);
        var actual = new double[vectors.Samples.Length];

        for (var n = 0; n < actual.Length; n++)
        {
            row[0] = vectors.Samples[n];
            offset.Step(row, blocked);
            actual[n] = blocked[0];
        }

        vectors.AssertMatches("dc_blocked", actual);
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void The_recursion_alone_agrees(string name)
    {
        var (vectors, model) = (new PhaseVectors(name), PhaseCase.Of(name, "true"));

        AssertRecursion(vectors, model, vectors.Samples, 0, "kalman_h0ms");
        AssertRecursion(vectors, model, vectors.Samples, model.HorizonSamples[3], "kalman_h20ms");
        AssertRecursion(vectors, model, vectors.WithGaps, 0, "kalman_skip");
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void The_oscillator_estimator_agrees(string name)
    {
        var (vectors, model) = (new PhaseVectors(name), PhaseCase.Of(name, "fitted"));

        AssertEstimator(vectors, new OscillatorEstimator(), model, vectors.Samples, 0, "default_h0ms");
        AssertEstimator(vectors, new OscillatorEstimator(), model, vectors.Samples, model.HorizonSamples[3], "default_h20ms");
        AssertEstimator(vectors, new OscillatorEstimator(), model, vectors.WithGaps, 0, "default_skip");
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void The_bandpass_with_quadrature_agrees(string name)
    {
        var (vectors, model) = (new PhaseVectors(name), PhaseCase.Of(name, "fitted"));

        AssertEstimator(vectors, new BandpassQuadratureEstimator(dcBlock: false), model, vectors.Samples, 0, "bp2_quad");
    }

    private static void AssertRecursion(PhaseVectors vectors, PhaseCase model, double[] samples, int horizon, string column)
    {
        var bank = new OscillatorBank(model.Model, SteadyGain.Of(model.Model), 1);
        var powers = new PolePowers(model.Oscillators);
        for (var row = 0; row < horizon; row++) powers.Advance();
        var weights = powers.Re.Zip(powers.Im, (re, im) => new Turn(re, im)).ToArray();
        var rows = Enumerable.Range(0, 4).Select(_ => new double[RowLength.Padded(1)]).ToArray();
        var (re, im) = (new double[samples.Length], new double[samples.Length]);

        for (var n = 0; n < samples.Length; n++)
        {
            rows[0][0] = double.IsNaN(samples[n]) ? 0 : samples[n];
            rows[1][0] = double.IsNaN(samples[n]) ? 1 : 0;
            bank.Step(rows[0], rows[1]);
            bank.Read(weights, rows[2], rows[3]);
            (re[n], im[n]) = (rows[2][0], rows[3][0]);
        }

        vectors.AssertMatches(column + "_re", re);
        vectors.AssertMatches(column + "_im", im);
    }

    private static void AssertEstimator(
        PhaseVectors vectors, IPhaseEstimator estimator, PhaseCase model, double[] samples, int horizon, string column)
    {
        estimator.Prepare(Signals.Format(model.RateHz, 1), model.Band, PhaseModels.Calibration(model.Model));
        var phasors = new Phasors(1);
        var (re, im) = (new double[samples.Length], new double[samples.Length]);

        for (var n = 0; n < samples.Length; n++)
        {
            estimator.Step(samples.AsSpan(n, 1), phasors);
            if (horizon > 0) estimator.Predict(horizon, phasors);
            (re[n], im[n]) = (phasors.Re[0], phasors.Im[0]);
        }

        vectors.AssertMatches(column + "_re", re);
        vectors.AssertMatches(column + "_im", im);
    }
}
