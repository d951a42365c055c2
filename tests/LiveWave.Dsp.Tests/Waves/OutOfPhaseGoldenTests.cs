using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Acceptance line 19 of our wave study: 1e-6 relative.</summary>
public class OutOfPhaseGoldenTests
{
    private const double Tolerance = 1e-6;

    public static IEnumerable<TheoryDataRow<string, string>> Cases() => WaveGolden.Root.GetProperty("quadrature").EnumerateArray()
        .Select(entry => new TheoryDataRow<string, string>(entry.GetProperty("id").GetString()!, entry.GetProperty("layout").GetString()!));

    [Theory]
    [MemberData(nameof(Cases))]
    public void At_the_studys_wave_vector_the_test_gives_the_studys_numbers(string id, string layout)
    {
        var expected = Case(id, layout);
        var (frame, geometry, _) = WaveGolden.Whitened(expected);
        var template = new PlaneTemplate(geometry);
        var k = expected.Numbers("k");

        if (geometry.Rank == 2) template.Hold(frame, k[0], k[1]);
        else template.Hold(frame, k[0] * geometry.AxisX + k[1] * geometry.AxisY, 0);
        var (x, energy) = OutOfPhase.Parts(frame, template);

        AssertClose(expected.Number("whitened_energy"), frame.Energy);
        AssertClose(expected.Number("x"), x);
        AssertClose(expected.Number("E"), energy);
        AssertClose(expected.Number("Lq"), OutOfPhase.Gain(frame, template));
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void A_reading_finds_that_wave_vector_and_both_gates(string id, string layout)
    {
        var expected = Case(id, layout);
        var k = expected.Numbers("k");

        var reading = WaveGolden.Read(expected, threshold: -100);

        var limit = new ArrayGeometry(WaveGolden.Layout(expected)).WaveNumberLimit;
        Assert.Equal(k[0], reading.WaveVectorX, Tolerance * limit);
        Assert.Equal(k[1], reading.WaveVectorY, Tolerance * limit);
        AssertClose(expected.Number("dL"), reading.GainOverUniform);
        AssertClose(expected.Number("Lq"), reading.GainOutOfPhase);
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Only_travelling_waves_have_a_statistic(string id, string layout)
    {
        var expected = Case(id, layout);

        var reading = WaveGolden.Read(expected, threshold: 1);

        var isPlane = expected.GetProperty("label").GetString() == "plane";
        Assert.Equal(isPlane, reading.Statistic >= 1);
        Assert.Equal(isPlane, reading.Kind == WaveKind.Planar);
        if (!isPlane && reading.GainOutOfPhase < 4 && reading.Evidence.Planar >= 1) Assert.Equal(double.NegativeInfinity, reading.Statistic);
    }

    [Theory]
    [InlineData("two poles", "g8_0.4c", WaveKind.Standing)]           // it has a node
    [InlineData("random smooth", "g8_0.4c", WaveKind.InPhase)]
    [InlineData("uniform", "g8_0.4c", WaveKind.NotResolved)]
    [InlineData("plane 6 L", "g8_0.4c", WaveKind.NotResolved)]
    public void Other_common_rhythms_are_called_what_they_are(string id, string layout, WaveKind kind)
    {
        Assert.Equal(kind, WaveGolden.Read(Case(id, layout), threshold: 1).Kind);
    }

    private static System.Text.Json.JsonElement Case(string id, string layout) => WaveGolden.Root.GetProperty("quadrature").EnumerateArray()
        .Single(entry => entry.GetProperty("id").GetString() == id && entry.GetProperty("layout").GetString() == layout);

    private static void AssertClose(double expected, double actual) =>
        Assert.Equal(expected, actual, Tolerance * Math.Max(1, Math.Abs(expected)));
}
