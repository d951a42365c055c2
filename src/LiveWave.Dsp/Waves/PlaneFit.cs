namespace LiveWave.Dsp;

/// <summary>Generalised least squares for the wave vector of a planar wave in noise of known covariance. No allocation after the
/// start.</summary>
/// <remarks>
/// Minimises (z − αh)ᴴC⁻¹(z − αh) by Gauss and Newton's steps with the complex amplitude α eliminated (variable projection):
/// D_a = −iα(x_a h − γ_a h) with γ_a = hᴴC⁻¹(x_a h)/hᴴC⁻¹h, A_ab = Re D_aᴴC⁻¹D_b, g_a = Re D_aᴴC⁻¹(z − αh), step A⁻¹g. Steps are
/// at most one grid step long and are halved up to twice where less would be explained than before.
/// </remarks>
internal sealed class PlaneFit
{
    private const int Steps = 3;
    private const int Halvings = 2;
    private const double Tiny = 1e-300;

    private readonly ArrayGeometry _geometry;
    private readonly PlaneSlope[] _slopes;
    private PlaneTemplate _trial;

    /// <summary>Makes room.</summary>
    /// <param name="geometry">The array.</param>
    public PlaneFit(ArrayGeometry geometry)
    {
        _geometry = geometry;
        _slopes = new PlaneSlope[geometry.Rank];
        for (var i = 0; i < _slopes.Length; i++) _slopes[i] = new PlaneSlope(geometry, i);
        Template = new PlaneTemplate(geometry);
        _trial = new PlaneTemplate(geometry);
    }

    /// <summary>Where the fit stands.</summary>
    public PlaneTemplate Template { get; private set; }

    /// <summary>Variance of the wave vector along the first coordinate for noise of the covariance given, (rad/mm)².</summary>
    public double VarianceFirst { get; private set; }

    /// <summary>Variance along the second; 0 on a line.</summary>
    public double VarianceSecond { get; private set; }

    /// <summary>Covariance of the two.</summary>
    public double Covariance { get; private set; }

    /// <summary>Refines <see cref="Template"/>, which was held against the frame at the start.</summary>
    /// <param name="frame">The frame.</param>
    public void Refine(WhitenedFrame frame)
    {
        for (var step = 0; step < Steps; step++)
        {
            // The next step from the same place would be the same one.
            if (!Improve(frame)) return;
        }
    }

    /// <summary>Finds variances and covariance where the fit stands.</summary>
    /// <param name="frame">The frame.</param>
    public void Spread(WhitenedFrame frame)
    {
        var (a11, a12, a22) = Curvature(frame);
        if (_geometry.Rank == 1)
        {
            (VarianceFirst, Covariance, VarianceSecond) = (0.5 / Math.Max(a11, Tiny), 0, 0);
            return;
        }

        var determinant = Math.Max(a11 * a22 - a12 * a12, Tiny);
        (VarianceFirst, Covariance, VarianceSecond) = (0.5 * a22 / determinant, -0.5 * a12 / determinant, 0.5 * a11 / determinant);
    }

    private bool Improve(WhitenedFrame frame)
    {
        var (first, second) = Step(frame);
        var length = Portable.Hypot(first, second);
        if (length > _geometry.WaveNumberStep)
        {
            (first, second) = (first * _geometry.WaveNumberStep / length, second * _geometry.WaveNumberStep / length);
        }

        for (var halving = 0; halving <= Halvings; halving++)
        {
            var (k, l) = (Template.First + first, Template.Second + second);
            var modulus = Portable.Hypot(k, l);
            if (modulus > _geometry.WaveNumberLimit)
            {
                (k, l) = (k * _geometry.WaveNumberLimit / modulus, l * _geometry.WaveNumberLimit / modulus);
            }

            _trial.Hold(frame, k, l);
            if (_trial.Explained > Template.Explained)
            {
                (Template, _trial) = (_trial, Template);
                return true;
            }

            (first, second) = (0.5 * first, 0.5 * second);
        }

        return false;
    }

    private (double First, double Second) Step(WhitenedFrame frame)
    {
        var (a11, a12, a22) = Curvature(frame);
        var g1 = _slopes[0].Gradient(frame, Template);
        if (_geometry.Rank == 1) return (g1 / Math.Max(a11, Tiny), 0);
        var g2 = _slopes[1].Gradient(frame, Template);
        var determinant = Math.Max(a11 * a22 - a12 * a12, Tiny);
        return ((a22 * g1 - a12 * g2) / determinant, (a11 * g2 - a12 * g1) / determinant);
    }

    private (double A11, double A12, double A22) Curvature(WhitenedFrame frame)
    {
        _slopes[0].Hold(frame, Template);
        var a11 = _slopes[0].Product(_slopes[0], Template);
        if (_geometry.Rank == 1) return (a11, 0, 0);
        _slopes[1].Hold(frame, Template);
        return (a11, _slopes[0].Product(_slopes[1], Template), _slopes[1].Product(_slopes[1], Template));
    }
}
