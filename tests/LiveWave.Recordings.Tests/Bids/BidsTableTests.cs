using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class BidsTableTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Cells_are_read_by_column_name_and_missing_ones_are_told()
    {
        var table = Read("name\ttype\tlow_cutoff\nr1c1\tECOG\t0.5\nr1c2\tn/a\tn/a\n");

        Assert.Equal(["name", "type", "low_cutoff"], table.Columns);
        Assert.Equal(2, table.RowCount);
        Assert.Equal("ECOG", table.Text(0, "type"));
        Assert.Null(table.Text(1, "type"));
        Assert.Equal(0.5, table.Number(0, "low_cutoff"));
        Assert.Equal(double.NaN, table.Number(1, "low_cutoff"));
    }

    [Theory]
    [InlineData("\uFEFFname\tx\r\na\t1\r\n\r\n")]
    [InlineData("name\tx\n\na\t1")]
    public void Byte_order_mark_other_line_ends_and_empty_lines_are_tolerated(string text)
    {
        var table = Read(text);

        Assert.Equal(1, table.RowCount);
        Assert.Equal(1, table.Number(0, "x"));
    }

    [Theory]
    [InlineData("", "the table is empty")]
    [InlineData("name\tname\n", "line 1: two columns are called 'name'; they are columns 1 and 2")]
    [InlineData("name\t\tx\n", "line 1: column 2 has no name")]
    [InlineData("name\tx\na\t1\nb\n", "line 3: 1 cells, the header has 2")]
    [InlineData("name\tx\n\na\t1\t2\n", "line 3: 3 cells, the header has 2")]
    public void A_malformed_table_is_refused_with_its_line(string text, string said)
    {
        Assert.Contains(said, Assert.Throws<RefusedException>(() => Read(text)).Message);
    }

    [Theory]
    [InlineData("1,5")]
    [InlineData("NaN")]
    [InlineData("1e999")]
    [InlineData("\"1\"")]
    public void What_is_no_number_is_refused_with_line_and_column(string cell)
    {
        var table = Read($"name\tx\na\t1\nb\t{cell}\n");

        var said = Assert.Throws<RefusedException>(() => table.Number(1, "x")).Message;

        Assert.Contains($"line 3, column 'x': '{cell}' is not a number", said);
    }

    [Fact]
    public void A_missing_column_is_answered_by_what_is_there()
    {
        var table = Read("name\tx\n");

        Assert.False(table.Has("y"));
        Assert.Contains("column 'y' is missing; it has name, x", Assert.Throws<RefusedException>(() => table.Require("x", "y")).Message);
    }

    private BidsTable Read(string text) => BidsTable.Read(_folder.Write("table.tsv", text));
}
