using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class ElectrodeTableTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("mm", 0.4, -1.2, 0.4, -1.2)]
    [InlineData("cm", 0.04, -0.12, 0.4, -1.2)]
    [InlineData("m", 0.0004, -0.0012, 0.4, -1.2)]
    [InlineData("um", 400, -1200, 0.4, -1.2)]
    [InlineData("\u00B5m", 400, -1200, 0.4, -1.2)]
    [InlineData("\u03BCm", 400, -1200, 0.4, -1.2)]
    public void Positions_are_in_mm_whatever_the_table_is_in(string unit, double x, double y, double xMm, double yMm)
    {
        var read = Read(FormattableString.Invariant($"name\tx\ty\tz\tsize\nr1c2\t{x}\t{y}\tn/a\tn/a\n"), unit);

        var (name, readX, readY) = Assert.Single(read);
        Assert.Equal("r1c2", name);
        Assert.Equal(xMm, readX, 1e-15);
        Assert.Equal(yMm, readY, 1e-15);
    }

    [Fact]
    public void An_electrode_without_a_position_is_left_out_and_the_order_stays()
    {
        var read = Read("size\tname\ty\tx\n1\tb\t1\t2\n1\tc\tn/a\t2\n1\td\t1\tn/a\n1\ta\t3\t4\n");

        Assert.Equal([("b", 2.0, 1.0), ("a", 4.0, 3.0)], read);
    }

    [Theory]
    [InlineData("name\tx\ty\na\t1\t1\na\t2\t2\n", "line 3, column 'name': 'a' is there twice; the other is in line 2")]
    [InlineData("name\tx\ty\na\t1\tnorth\n", "line 2, column 'y': 'north' is not a number")]
    [InlineData("name\tx\ty\nn/a\t1\t1\n", "line 2, column 'name': the electrode has no name")]
    [InlineData("name\tx\na\t1\n", "line 1: column 'y' is missing; it has name, x")]
    public void A_table_that_cannot_be_meant_is_refused_with_its_place(string text, string said)
    {
        Assert.Contains(said, Assert.Throws<RefusedException>(() => Read(text)).Message);
    }

    [Theory]
    [InlineData("inch", "allowed are mm, cm, m, um")]
    [InlineData("pixels", "carry no length")]
    public void A_unit_without_a_length_is_refused(string unit, string said)
    {
        Assert.Contains(said, Assert.Throws<RefusedException>(() => Read("name\tx\ty\n", unit)).Message);
    }

    private IReadOnlyList<(string Name, double XMm, double YMm)> Read(string text, string unit = "mm") =>
        ElectrodeTable.Read(_folder.Write("electrodes.tsv", text), unit);
}
