using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads a BIDS <c>electrodes.tsv</c>: columns <c>name</c>, <c>x</c>, <c>y</c>; what else it has is not used.</summary>
public static class ElectrodeTable
{
    /// <summary>Reads the positions.</summary>
    /// <param name="path">The file.</param>
    /// <param name="unit">What x and y are in: <c>mm</c>, <c>cm</c>, <c>m</c> or <c>um</c>. The table itself doesn't say.</param>
    /// <returns>In the order of the table, in mm; electrodes whose x or y is <c>n/a</c> are left out.</returns>
    /// <exception cref="RefusedException">The file is no table, a column is missing, a name is missing or used twice, a position is not
    /// a number, or the unit is none of those.</exception>
    public static IReadOnlyList<(string Name, double XMm, double YMm)> Read(string path, string unit = "mm")
    {
        var (factor, divisor) = ToMm(unit, path);
        var table = BidsTable.Read(path);
        table.Require("name", "x", "y");
        var positions = new List<(string Name, double XMm, double YMm)>(table.RowCount);
        var lines = new Dictionary<string, int>(StringComparer.Ordinal);
        for (var row = 0; row < table.RowCount; row++)
        {
            var name = table.Text(row, "name") ?? throw table.Refusal(row, "name", "the electrode has no name", "name it as its channel");
            if (!lines.TryAdd(name, table.LineOf(row)))
            {
                throw table.Refusal(row, "name", $"'{PlainText.Of(name)}' is there twice", $"the other is in line {lines[name]}");
            }

            var x = table.Number(row, "x") * factor / divisor;
            var y = table.Number(row, "y") * factor / divisor;
            if (!double.IsNaN(x) && !double.IsNaN(y)) positions.Add((name, x, y));
        }

        return positions;
    }

    // A factor and a divisor, so that 400 um are 0.4 mm to the last bit.
    private static (double Factor, double Divisor) ToMm(string unit, string path) => unit switch
    {
        "mm" => (1, 1),
        "cm" => (10, 1),
        "m" => (1000, 1),
        "um" or "\u00B5m" or "\u03BCm" => (1, 1000),
        "pixels" => throw new RefusedException("positions in pixels carry no length", path, "convert them to mm with the array's pitch"),
        _ => throw new RefusedException($"unit '{PlainText.Of(unit)}' of the positions is not known", path, "allowed are mm, cm, m, um"),
    };
}
