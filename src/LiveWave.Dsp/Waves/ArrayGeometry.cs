using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What follows from where a patch's good electrodes lie, in the array's own frame (unrotated). Immutable.</summary>
/// <remarks>Wave vectors are written along the array's coordinates: x and y where the electrodes fill a plane, the one principal
/// axis where they lie on a line.</remarks>
internal sealed class ArrayGeometry
{
    /// <summary>Most good channels that the whitened estimators take as they are.</summary>
    public const int MostChannels = 256;

    private const int LeastInPlane = 8;
    private const int LeastOnLine = 5;
    private const double OnLineBelow = 1e-3;        // smaller over larger eigenvalue of the scatter
    private const double SamePlaceMm = 1e-6;
    private const int MostTemplates = 4096;
    private const double GridSlack = 1e-9;          // a grid point on the limit stays in, whatever rounding says

    private readonly double[][] _coordinates;

    /// <summary>Measures the array.</summary>
    /// <param name="layout">At least 8 good electrodes in a plane, 5 on a line, no two at one place.</param>
    /// <param name="shortestWavelengthMm">Shortest wavelength looked for, mm, at least two pitches; 0: the larger of 2.5 pitches
    /// and half the aperture.</param>
    /// <exception cref="RefusedException">Too few or too many channels, or a wavelength this array can't resolve.</exception>
    public ArrayGeometry(Layout layout, double shortestWavelengthMm = 0)
    {
        Channels = layout.GoodChannels();
        if (Channels.Length > MostChannels)
        {
            throw Refused($"{Channels.Length} good channels", $"not yet: super-electrodes; give at most {MostChannels}");
        }

        if (Channels.Length < LeastOnLine) throw TooFew(LeastOnLine, "on a line");
        (XMm, YMm) = Centred(layout, Channels);
        (Rank, AxisX, AxisY) = PrincipalAxis(XMm, YMm);
        if (Rank == 2 && ChannelCount < LeastInPlane) throw TooFew(LeastInPlane, "in a plane");
        _coordinates = Rank == 2 ? [XMm, YMm] : [Projected()];
        PitchMm = Pitch(layout);
        ApertureMm = Math.Max(Extent(_coordinates[0]), Rank == 2 ? Extent(_coordinates[1]) : 0);
        ShortestWavelengthMm = shortestWavelengthMm > 0 ? shortestWavelengthMm : Math.Max(2.5 * PitchMm, 0.5 * ApertureMm);
        if (ShortestWavelengthMm < 2 * PitchMm * (1 - GridSlack))
        {
            throw Refused(
                $"a shortest wavelength of {ShortestWavelengthMm} mm is below two pitches of {PitchMm} mm",
                "phase steps of more than half a cycle between neighbours look like shorter ones: give a longer one");
        }

        WaveNumberLimit = 2 * Math.PI / ShortestWavelengthMm;
        WaveNumberStep = Math.PI / (2 * ApertureMm);
        HalfGrid = HalfOfGrid();
    }

    /// <summary>The good channels' numbers within the patch, ascending.</summary>
    public int[] Channels { get; }

    /// <summary>Number of good channels.</summary>
    public int ChannelCount => Channels.Length;

    /// <summary>Positions along x from the mean of all good ones, mm.</summary>
    public double[] XMm { get; }

    /// <summary>Positions along y from the mean of all good ones, mm.</summary>
    public double[] YMm { get; }

    /// <summary>2 where the electrodes fill a plane, 1 where they lie on a line.</summary>
    public int Rank { get; }

    /// <summary>x component of the unit vector along which the array is longest; never negative.</summary>
    public double AxisX { get; }

    /// <summary>y component of that vector.</summary>
    public double AxisY { get; }

    /// <summary>Median distance to the nearest neighbour, mm.</summary>
    public double PitchMm { get; }

    /// <summary>Larger side of the bounding box, or the length of a line, mm.</summary>
    public double ApertureMm { get; }

    /// <summary>Shortest wavelength looked for, mm.</summary>
    public double ShortestWavelengthMm { get; }

    /// <summary>Longest wave vector looked for, rad/mm.</summary>
    public double WaveNumberLimit { get; }

    /// <summary>Step of the wave vector grid, a quarter turn over the aperture, rad/mm.</summary>
    public double WaveNumberStep { get; }

    /// <summary>One of each pair k and −k of the Cartesian grid of wave vectors (coordinates, rad/mm) without k = 0; the second
    /// component is 0 on a line.</summary>
    public (double First, double Second)[] HalfGrid { get; }

    /// <summary>The electrodes' places along one coordinate of the array, mm.</summary>
    /// <param name="which">0 to <see cref="Rank"/> − 1.</param>
    public ReadOnlySpan<double> Coordinate(int which) => _coordinates[which];

    /// <summary>From the array's coordinates to x and y.</summary>
    /// <param name="first">Along the first coordinate.</param>
    /// <param name="second">Along the second; left out on a line.</param>
    public (double X, double Y) ToPlane(double first, double second) =>
        Rank == 2 ? (first, second) : (first * AxisX, first * AxisY);

    /// <summary>k·x at the good channels, radians. Allocates.</summary>
    /// <param name="waveVector">Coordinates, rad/mm.</param>
    public double[] Phases((double First, double Second) waveVector)
    {
        var phases = new double[ChannelCount];
        var along = Coordinate(0);
        var across = Coordinate(Rank - 1);
        for (var i = 0; i < phases.Length; i++) phases[i] = waveVector.First * along[i] + waveVector.Second * across[i];
        return phases;
    }

    private static RefusedException Refused(string what, string advice) => new(what, "layout", advice);

    private static (double[] X, double[] Y) Centred(Layout layout, int[] channels)
    {
        var x = Array.ConvertAll(channels, channel => layout.Electrodes[channel].XMm);
        var y = Array.ConvertAll(channels, channel => layout.Electrodes[channel].YMm);
        var meanX = Sums.Sum(x) / x.Length;
        var meanY = Sums.Sum(y) / y.Length;
        return (Array.ConvertAll(x, value => value - meanX), Array.ConvertAll(y, value => value - meanY));
    }

    private static (int Rank, double AxisX, double AxisY) PrincipalAxis(double[] x, double[] y)
    {
        var (xx, xy, yy) = (Sums.Dot(x, x), Sums.Dot(x, y), Sums.Dot(y, y));
        var middle = 0.5 * (xx + yy);
        var half = Portable.Hypot(0.5 * (xx - yy), xy);
        var largest = middle + half;
        var (axisX, axisY) = xx >= yy ? (largest - yy, xy) : (xy, largest - xx);
        var length = Portable.Hypot(axisX, axisY);
        if (length > 0) (axisX, axisY) = (axisX / length, axisY / length);
        else (axisX, axisY) = (1, 0);
        if (axisX < -1e-9 || (axisX <= 1e-9 && axisY < 0)) (axisX, axisY) = (-axisX, -axisY);
        return (middle - half > OnLineBelow * largest ? 2 : 1, axisX, axisY);
    }

    private static double Extent(double[] places) => places.Max() - places.Min();

    private RefusedException TooFew(int least, string where) =>
        Refused($"{ChannelCount} good channels", $"planar waves need at least {least} {where}");

    private double[] Projected()
    {
        var along = new double[ChannelCount];
        for (var i = 0; i < along.Length; i++) along[i] = XMm[i] * AxisX + YMm[i] * AxisY;
        return along;
    }

    private double Pitch(Layout layout)
    {
        var nearest = new double[ChannelCount];
        Array.Fill(nearest, double.PositiveInfinity);
        for (var i = 0; i < nearest.Length; i++)
        {
            for (var j = 0; j < nearest.Length; j++)
            {
                if (i == j) continue;
                var distance = Portable.Hypot(XMm[i] - XMm[j], YMm[i] - YMm[j]);
                if (distance < SamePlaceMm)
                {
                    var (one, other) = (layout.Electrodes[Channels[i]].Channel, layout.Electrodes[Channels[j]].Channel);
                    throw Refused($"{one} and {other} lie at one place", "give each its own, or mark one as bad");
                }

                nearest[i] = Math.Min(nearest[i], distance);
            }
        }

        Array.Sort(nearest);
        return 0.5 * (nearest[nearest.Length / 2] + nearest[(nearest.Length - 1) / 2]);
    }

    private (double First, double Second)[] HalfOfGrid()
    {
        var most = (int)Math.Floor(WaveNumberLimit / WaveNumberStep + GridSlack);
        var grid = new List<(double, double)>();
        for (var second = 0; second <= (Rank == 2 ? most : 0); second++)
        {
            for (var first = second == 0 ? 1 : -most; first <= most; first++)
            {
                var (k, l) = (first * WaveNumberStep, second * WaveNumberStep);
                if (Portable.Hypot(k, l) <= WaveNumberLimit * (1 + GridSlack)) grid.Add((k, l));
            }

            if (grid.Count > MostTemplates / 2)
            {
                throw Refused(
                    $"a shortest wavelength of {ShortestWavelengthMm} mm needs too fine a search over {ApertureMm} mm", "give a longer one");
            }
        }

        return grid.Count > 0
            ? [.. grid]
            : throw Refused($"a shortest wavelength of {ShortestWavelengthMm} mm is over four apertures", "give a shorter one");
    }
}
