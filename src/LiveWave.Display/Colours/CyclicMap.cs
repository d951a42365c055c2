namespace LiveWave.Display;

/// <summary>Colours for phases and directions: a circle of hues in OKLab whose lightness is tilted.</summary>
/// <remarks>At constant lightness two phases a quarter cycle apart can look the same to a colour-blind eye, which sees the circle
/// folded onto a line. Tilting it (L = 0.72 + 0.20 cos(h − 150°), C = 0.133) replaces the lost axis by lightness: any two phases at
/// least 90° apart differ by at least 0.14 in OKLab for all three dichromacies (Machado et al., 2009). OKLab: Ottosson (2020).</remarks>
internal static class CyclicMap
{
    /// <summary>Steps of the circle: fine enough for the eye, coarse enough that a slow line keeps up.</summary>
    public const int Steps = 64;

    private const double Chroma = 0.133;
    private const double MiddleLightness = 0.72;
    private const double Tilt = 0.20;
    private const double LightestRadians = 150 * Math.PI / 180;

    // Where there are sixteen: eight names round the circle, bright ones on its light half.
    private static readonly byte[] Names = [1, 3, 11, 10, 14, 6, 12, 5];

    private static readonly Colour[] Table = [.. Enumerable.Range(0, Steps).Select(step => Exact(2 * Math.PI * step / Steps))];

    /// <summary>The colour of a phase.</summary>
    /// <param name="radians">Any finite angle; 0: peak.</param>
    public static Colour AtRadians(double radians)
    {
        var step = (int)Math.Round(radians * (Steps / (2 * Math.PI))) % Steps;
        return Table[step < 0 ? step + Steps : step];
    }

    /// <summary>The colour of a direction.</summary>
    /// <param name="degrees">Any finite angle.</param>
    public static Colour AtDegrees(double degrees) => AtRadians(degrees * (Math.PI / 180));

    /// <summary>The colour of a phase, not rounded to steps.</summary>
    internal static Colour Exact(double radians)
    {
        var lightness = MiddleLightness + (Tilt * Math.Cos(radians - LightestRadians));
        var (a, b) = (Chroma * Math.Cos(radians), Chroma * Math.Sin(radians));
        var l = Cube(lightness + (0.3963377774 * a) + (0.2158037573 * b));
        var m = Cube(lightness - (0.1055613458 * a) - (0.0638541728 * b));
        var s = Cube(lightness - (0.0894841775 * a) - (1.2914855480 * b));
        var eighth = (int)Math.Round(radians * (4 / Math.PI)) & 7;
        return new Colour(
            Encode((4.0767416621 * l) - (3.3077115913 * m) + (0.2309699292 * s)),
            Encode((-1.2684380046 * l) + (2.6097574011 * m) - (0.3413193965 * s)),
            Encode((-0.0041960863 * l) - (0.7034186147 * m) + (1.7076147010 * s)),
            Names[eighth]);
    }

    private static double Cube(double x) => x * x * x;

    // The transfer curve of sRGB (IEC 61966-2-1).
    private static byte Encode(double linear)
    {
        var x = Math.Clamp(linear, 0, 1);
        var encoded = x <= 0.0031308 ? 12.92 * x : (1.055 * Math.Pow(x, 1 / 2.4)) - 0.055;
        return (byte)Math.Round(255 * encoded);
    }
}
