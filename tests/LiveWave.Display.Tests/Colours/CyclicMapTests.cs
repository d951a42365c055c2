namespace LiveWave.Display.Tests;

public sealed class CyclicMapTests
{
    private const int Phases = 72;

    // Machado, Oliveira, Fernandes (2009), severity 1.0, on linear RGB.
    private static readonly double[] Protan =
        [0.152286, 1.052583, -0.204868, 0.114503, 0.786281, 0.099216, -0.003882, -0.048116, 1.051998];

    private static readonly double[] Deutan =
        [0.367322, 0.860646, -0.227968, 0.280085, 0.672501, 0.047413, -0.011820, 0.042940, 0.968881];

    private static readonly double[] Tritan =
        [1.255528, -0.076749, -0.178779, -0.078411, 0.930809, 0.147602, 0.004733, 0.691367, 0.303900];

    private static readonly double[] Normal = [1, 0, 0, 0, 1, 0, 0, 0, 1];

    public static TheoryData<string, double> Eyes => new()
    {
        { nameof(Normal), 0.18 },
        { nameof(Protan), 0.15 },
        { nameof(Deutan), 0.15 },
        { nameof(Tritan), 0.14 },
    };

    [Theory]
    [MemberData(nameof(Eyes))]
    public void Phases_a_quarter_cycle_apart_look_different_to_every_eye(string eye, double leastDistance)
    {
        var seen = Enumerable.Range(0, Phases).Select(i => Seen(CyclicMap.Exact(2 * Math.PI * i / Phases), MatrixOf(eye))).ToArray();

        var least = (from i in Enumerable.Range(0, Phases)
                     from j in Enumerable.Range(0, Phases)
                     where Math.Min((i - j + Phases) % Phases, (j - i + Phases) % Phases) >= Phases / 4
                     select Distance(seen[i], seen[j])).Min();

        Assert.True(least > leastDistance, $"{least}");
    }

    [Fact]
    public void The_circle_closes()
    {
        Assert.Equal(CyclicMap.AtDegrees(0), CyclicMap.AtDegrees(360));
        Assert.Equal(CyclicMap.AtDegrees(-90), CyclicMap.AtDegrees(270));
    }

    [Fact]
    public void Eight_directions_have_eight_names_where_a_terminal_has_sixteen()
    {
        Assert.Equal(8, Enumerable.Range(0, 8).Select(i => CyclicMap.AtDegrees(45 * i).Basic).Distinct().Count());
    }

    private static double[] MatrixOf(string eye) => eye switch
    {
        nameof(Protan) => Protan,
        nameof(Deutan) => Deutan,
        nameof(Tritan) => Tritan,
        _ => Normal,
    };

    /// <summary>OKLab (Ottosson 2020) of a colour as an eye sees it.</summary>
    private static double[] Seen(Colour colour, double[] eye)
    {
        double[] rgb = [Linear(colour.Red), Linear(colour.Green), Linear(colour.Blue)];
        var r = Row(eye, 0, rgb);
        var g = Row(eye, 3, rgb);
        var b = Row(eye, 6, rgb);
        var l = Math.Cbrt((0.4122214708 * r) + (0.5363325363 * g) + (0.0514459929 * b));
        var m = Math.Cbrt((0.2119034982 * r) + (0.6806995451 * g) + (0.1073969566 * b));
        var s = Math.Cbrt((0.0883024619 * r) + (0.2817188376 * g) + (0.6299787005 * b));
        return
        [
            (0.2104542553 * l) + (0.7936177850 * m) - (0.0040720468 * s),
            (1.9779984951 * l) - (2.4285922050 * m) + (0.4505937099 * s),
            (0.0259040371 * l) + (0.7827717662 * m) - (0.8086757660 * s),
        ];
    }

    private static double Row(double[] matrix, int from, double[] rgb) =>
        Math.Clamp((matrix[from] * rgb[0]) + (matrix[from + 1] * rgb[1]) + (matrix[from + 2] * rgb[2]), 0, 1);

    private static double Linear(byte encoded)
    {
        var x = encoded / 255.0;
        return x <= 0.04045 ? x / 12.92 : Math.Pow((x + 0.055) / 1.055, 2.4);
    }

    private static double Distance(double[] a, double[] b) =>
        Math.Sqrt(a.Zip(b, (x, y) => (x - y) * (x - y)).Sum());
}
