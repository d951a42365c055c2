using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What a phase model settles to: gains, covariance and spread of the steady-state filter. Does not depend on data.</summary>
/// <remarks>States are ordered (real, imaginary) per oscillator, then the background; variances in units of the channel scale
/// squared. The predicted covariance P solves P = F (P − P C'C P/(C P C' + r)) F' + Q and is found by structure-preserving
/// doubling (Anderson 1978; Chu, Fan and Lin 2005).</remarks>
internal sealed class SteadyGain
{
    private const int MostDoublings = 60;
    private const double Converged = 1e-13;

    private readonly PhaseModel _model;

    private SteadyGain(PhaseModel model, RealMatrix predicted)
    {
        _model = model;
        PredictedCovariance = predicted;
        var size = predicted.Rows;
        var seen = Seen(model);
        var towardsSample = predicted * seen.Transposed();
        InnovationVariance = (seen * towardsSample)[0, 0] + model.WhiteVariance;
        Gain = new double[size];
        for (var i = 0; i < size; i++) Gain[i] = towardsSample[i, 0] / InnovationVariance;
        FilteredCovariance = new RealMatrix(size, size);
        for (var row = 0; row < size; row++)
        {
            for (var column = 0; column < size; column++)
            {
                FilteredCovariance[row, column] = predicted[row, column] - (Gain[row] * towardsSample[column, 0]);
            }
        }
    }

    /// <summary>Gain of each state on the innovation.</summary>
    internal double[] Gain { get; }

    /// <summary>Variance of sample minus its prediction.</summary>
    internal double InnovationVariance { get; }

    /// <summary>Covariance of the states after the sample was used.</summary>
    internal RealMatrix FilteredCovariance { get; }

    /// <summary>Covariance of the states before the sample is used.</summary>
    internal RealMatrix PredictedCovariance { get; }

    /// <summary>Variance per axis of the target where nothing was seen for long.</summary>
    internal double StationaryVariance
    {
        get
        {
            var sum = 0.0;
            foreach (var term in _model.Oscillators)
            {
                if (term.IsTarget) sum += term.DriveVariance / (1 - SquaredModulus(term));
            }

            return sum;
        }
    }

    /// <summary>Solves for a model.</summary>
    /// <param name="model">Stable, with at least one target oscillator and white noise.</param>
    /// <exception cref="RefusedException">The model is not of that kind.</exception>
    internal static SteadyGain Of(PhaseModel model)
    {
        Check(model);
        return new SteadyGain(model, PredictedCovarianceOf(model));
    }

    /// <summary>Posterior variance per axis of the target 0, 1 ... <paramref name="rows"/> rows after the last sample used.</summary>
    /// <param name="rows">The farthest horizon, at least 0.</param>
    /// <returns><paramref name="rows"/> + 1 variances.</returns>
    internal double[] VarianceAhead(int rows)
    {
        var poles = new PolePowers(_model.Oscillators);
        var table = new double[rows + 1];
        for (var ahead = 0; ahead <= rows; ahead++)
        {
            table[ahead] = VarianceAfter(poles);
            poles.Advance();
        }

        return table;
    }

    // Half the trace of R_j P_jl R_l' over the target, R the rotation and shrinkage of a pole's power, plus what drives the
    // states meanwhile: q (1 − ρ^2h)/(1 − ρ²).
    private double VarianceAfter(PolePowers poles)
    {
        var covariance = FilteredCovariance;
        var sum = 0.0;
        for (var j = 0; j < _model.Oscillators.Count; j++)
        {
            if (!_model.Oscillators[j].IsTarget) continue;
            for (var l = 0; l < _model.Oscillators.Count; l++)
            {
                if (!_model.Oscillators[l].IsTarget) continue;
                var cos = (poles.Re[j] * poles.Re[l]) + (poles.Im[j] * poles.Im[l]);
                var sin = (poles.Im[j] * poles.Re[l]) - (poles.Re[j] * poles.Im[l]);
                var along = covariance[2 * j, 2 * l] + covariance[(2 * j) + 1, (2 * l) + 1];
                var across = covariance[2 * j, (2 * l) + 1] - covariance[(2 * j) + 1, 2 * l];
                sum += 0.5 * ((cos * along) + (sin * across));
            }

            var left = (poles.Re[j] * poles.Re[j]) + (poles.Im[j] * poles.Im[j]);
            sum += _model.Oscillators[j].DriveVariance * (1 - left) / (1 - SquaredModulus(_model.Oscillators[j]));
        }

        return sum;
    }

    private static RealMatrix PredictedCovarianceOf(PhaseModel model)
    {
        var seen = Seen(model);
        var identity = RealMatrix.Identity(seen.Columns);
        var a = Transition(model).Transposed();
        var g = Information(seen, model.WhiteVariance);
        var h = Drive(model);
        for (var i = 0; i < MostDoublings; i++)
        {
            var w = new LuFactors(identity + (g * h));
            var wa = w.Solve(a);
            var added = a.Transposed() * h * wa;
            g = (g + (a * w.Solve(g) * a.Transposed())).Symmetrised();
            h = (h + added).Symmetrised();
            a *= wa;
            if (added.LargestElement() <= Converged * h.LargestElement()) return h;
        }

        throw new RefusedException("the phase model has no steady filter", "", "learn it again from a baseline");
    }

    private static RealMatrix Seen(PhaseModel model)
    {
        var oscillators = model.Oscillators.Count;
        var seen = new RealMatrix(1, (2 * oscillators) + model.Background.Count);
        for (var j = 0; j < oscillators; j++) seen[0, 2 * j] = 1;
        for (var b = 2 * oscillators; b < seen.Columns; b++) seen[0, b] = 1;
        return seen;
    }

    private static RealMatrix Information(RealMatrix seen, double whiteVariance)
    {
        var information = seen.Transposed() * seen;
        for (var row = 0; row < information.Rows; row++)
        {
            for (var column = 0; column < information.Columns; column++) information[row, column] /= whiteVariance;
        }

        return information;
    }

    private static RealMatrix Transition(PhaseModel model)
    {
        var oscillators = model.Oscillators.Count;
        var size = (2 * oscillators) + model.Background.Count;
        var transition = new RealMatrix(size, size);
        for (var j = 0; j < oscillators; j++)
        {
            var term = model.Oscillators[j];
            transition[2 * j, 2 * j] = term.PoleRe;
            transition[2 * j, (2 * j) + 1] = -term.PoleIm;
            transition[(2 * j) + 1, 2 * j] = term.PoleIm;
            transition[(2 * j) + 1, (2 * j) + 1] = term.PoleRe;
        }

        for (var b = 0; b < model.Background.Count; b++)
        {
            transition[(2 * oscillators) + b, (2 * oscillators) + b] = model.Background[b].Pole;
        }

        return transition;
    }

    private static RealMatrix Drive(PhaseModel model)
    {
        var oscillators = model.Oscillators.Count;
        var size = (2 * oscillators) + model.Background.Count;
        var drive = new RealMatrix(size, size);
        for (var state = 0; state < size; state++)
        {
            drive[state, state] = state < 2 * oscillators
                ? model.Oscillators[state / 2].DriveVariance
                : model.Background[state - (2 * oscillators)].DriveVariance;
        }

        return drive;
    }

    private static void Check(PhaseModel model)
    {
        if (!model.Oscillators.Any(term => term.IsTarget))
        {
            throw Refused("the phase model has no target oscillator");
        }

        // Written so that NaN is refused too.
        if (!(model.WhiteVariance > 0 && double.IsFinite(model.WhiteVariance)))
        {
            throw Refused($"the phase model's white variance is {model.WhiteVariance}, not above 0");
        }

        for (var j = 0; j < model.Oscillators.Count; j++)
        {
            var term = model.Oscillators[j];
            if (!(SquaredModulus(term) < 1)) throw Refused($"the pole of oscillator {j} is not inside the unit circle");
            CheckDrive(term.DriveVariance, $"oscillator {j}");
        }

        for (var b = 0; b < model.Background.Count; b++)
        {
            var term = model.Background[b];
            if (!(Math.Abs(term.Pole) < 1)) throw Refused($"the pole of background term {b} is not inside the unit circle");
            CheckDrive(term.DriveVariance, $"background term {b}");
        }
    }

    private static void CheckDrive(double variance, string of)
    {
        if (!(variance >= 0 && double.IsFinite(variance))) throw Refused($"the drive variance of {of} is {variance}");
    }

    private static double SquaredModulus(OscillatorTerm term) => (term.PoleRe * term.PoleRe) + (term.PoleIm * term.PoleIm);

    private static RefusedException Refused(string what) => new(what, "", "learn it again from a baseline");
}
