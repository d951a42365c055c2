using LiveWave.Abstractions;

namespace LiveWave.Display.Tests;

public sealed class ArrayMapTests
{
    [Fact]
    public void With_room_every_electrode_covers_cells_of_the_same_shape()
    {
        var map = new ArrayMap(Grid(8), columns: 34, rows: 16);

        Assert.Equal((32, 16), (map.Columns, map.Rows));
        var cells = Cells(map).SelectMany(cell => cell.Electrodes).GroupBy(electrode => electrode).ToList();
        Assert.Equal(64, cells.Count);
        Assert.All(cells, electrode => Assert.Equal(8, electrode.Count()));
    }

    [Fact]
    public void Plus_x_is_right_and_plus_y_is_up()
    {
        var layout = new Layout([new Electrode("low-left", 0, 0), new Electrode("up-right", 1, 1), new Electrode("low-right", 1, 0)]);

        var map = new ArrayMap(layout, columns: 8, rows: 4);

        Assert.Equal([0], map.At(0, map.Rows - 1));
        Assert.Equal([1], map.At(map.Columns - 1, 0));
    }

    [Fact]
    public void A_quarter_turn_turns_the_picture()
    {
        var layout = new Layout([new Electrode("first", 0, 0), new Electrode("right-of-it", 1, 0)], rotationDegrees: 90);

        var map = new ArrayMap(layout, columns: 8, rows: 4);

        Assert.Equal([1], map.At(0, 0));
        Assert.Equal([0], map.At(0, map.Rows - 1));
    }

    [Fact]
    public void Without_room_a_cell_stands_for_several_and_none_is_left_out()
    {
        var map = new ArrayMap(Grid(32), columns: 34, rows: 16);

        Assert.True(map.Columns <= 34 && map.Rows <= 16);
        Assert.Equal(1024, Cells(map).SelectMany(cell => cell.Electrodes).Distinct().Count());
    }

    private static Layout Grid(int side) => new(
        [.. from row in Enumerable.Range(0, side) from column in Enumerable.Range(0, side) select new Electrode($"r{row}c{column}", 0.4 * column, 0.4 * row)]);

    private static IEnumerable<(int X, int Y, IReadOnlyList<int> Electrodes)> Cells(ArrayMap map) =>
        from y in Enumerable.Range(0, map.Rows) from x in Enumerable.Range(0, map.Columns) select (x, y, map.At(x, y));
}
