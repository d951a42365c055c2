using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class ArrayGeometryTests
{
    private const double Same = 1e-8;       // the golden file holds nine digits

    public static IEnumerable<TheoryDataRow<int>> Layouts() =>
        Enumerable.Range(0, WaveGolden.Root.GetProperty("layouts").GetArrayLength()).Select(i => new TheoryDataRow<int>(i));

    [Theory]
    [MemberData(nameof(Layouts))]
    public void Pitch_aperture_and_grid_are_those_of_the_study(int number)
    {
        var expected = WaveGolden.Root.GetProperty("layouts")[number];

        var geometry = new ArrayGeometry(WaveGolden.Layout(expected));

        Assert.Equal(expected.Number("n"), geometry.ChannelCount);
        Assert.Equal(expected.Number("rank"), geometry.Rank);
        Assert.Equal(expected.Number("pitch_mm"), geometry.PitchMm, Same * geometry.PitchMm);
        Assert.Equal(expected.Number("aperture_mm"), geometry.ApertureMm, Same * geometry.ApertureMm);
        Assert.Equal(expected.Number("lambda_min_mm"), geometry.ShortestWavelengthMm, Same * geometry.ShortestWavelengthMm);
        Assert.Equal(expected.Number("k_max"), geometry.WaveNumberLimit, Same * geometry.WaveNumberLimit);
        Assert.Equal(expected.Number("k_step"), geometry.WaveNumberStep, Same * geometry.WaveNumberStep);
        Assert.Equal(expected.Number("n_k_grid"), 2 * geometry.HalfGrid.Length + 1);
    }

    [Theory]
    [InlineData(25, 0.9063077870366499, 0.42261826174069944)]
    [InlineData(90, 0, 1)]
    [InlineData(205, 0.9063077870366499, 0.42261826174069944)]
    [InlineData(270, 0, 1)]
    public void Electrodes_on_a_line_have_one_coordinate_along_it(double degrees, double axisX, double axisY)
    {
        var geometry = new ArrayGeometry(WaveFrames.Line(12, 0.2, degrees));

        Assert.Equal(1, geometry.Rank);
        Assert.Equal(axisX, geometry.AxisX, 1e-12);
        Assert.Equal(axisY, geometry.AxisY, 1e-12);
        Assert.Equal(2.2, geometry.ApertureMm, 1e-12);
        Assert.All(geometry.HalfGrid, k => Assert.Equal(0, k.Second));
    }

    [Fact]
    public void Turning_the_view_leaves_the_arrays_own_frame_alone()
    {
        var plain = new ArrayGeometry(WaveFrames.Grid(4, 5));
        var turned = new ArrayGeometry(WaveFrames.Grid(4, 5, rotationDegrees: 77));

        Assert.Equal(plain.XMm, turned.XMm);
        Assert.Equal(plain.HalfGrid, turned.HalfGrid);
    }

    [Theory]
    [InlineData(7, 1)]
    [InlineData(2, 2)]
    [InlineData(2, 3)]
    public void Too_few_electrodes_are_refused(int columns, int rows)
    {
        var layout = rows == 1 ? WaveFrames.Line(4, 0.1, 90) : WaveFrames.Grid(columns, rows);

        Assert.Throws<RefusedException>(() => new ArrayGeometry(layout));
    }

    [Fact]
    public void Eight_electrodes_in_a_plane_or_five_on_a_line_are_enough()
    {
        Assert.Equal(8, new ArrayGeometry(WaveFrames.Grid(4, 2)).ChannelCount);
        Assert.Equal(5, new ArrayGeometry(WaveFrames.Line(5, 0.1, 90)).ChannelCount);
    }

    [Fact]
    public void More_electrodes_than_it_can_take_are_refused_as_not_yet()
    {
        var refused = Assert.Throws<RefusedException>(() => new ArrayGeometry(WaveFrames.Grid(17, 16)));

        Assert.Contains("not yet: super-electrodes", refused.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Two_electrodes_at_one_place_are_refused_by_name()
    {
        var layout = new Layout([.. WaveFrames.Grid(4, 4).Electrodes, new Electrode("twin", 0.4, 0.8)]);

        var refused = Assert.Throws<RefusedException>(() => new ArrayGeometry(layout));

        Assert.Contains("twin", refused.Message, StringComparison.Ordinal);
        Assert.Contains("r2c1", refused.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0.79)]       // below two pitches: aliased
    [InlineData(13)]         // above four apertures: nothing left to search
    public void A_wavelength_limit_that_this_array_cannot_search_is_refused(double shortestWavelengthMm)
    {
        Assert.Throws<RefusedException>(() => new ArrayGeometry(WaveFrames.Grid(8, 8), shortestWavelengthMm));
    }

    [Fact]
    public void A_wavelength_limit_of_two_pitches_is_allowed()
    {
        Assert.Equal(0.8, new ArrayGeometry(WaveFrames.Grid(8, 8), 0.8).ShortestWavelengthMm);
    }

    [Fact]
    public void A_search_finer_than_thousands_of_templates_is_refused()
    {
        Assert.Throws<RefusedException>(() => new ArrayGeometry(WaveFrames.Grid(64, 3), 0.8));
    }
}
