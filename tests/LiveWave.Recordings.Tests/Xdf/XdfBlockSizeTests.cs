namespace LiveWave.Recordings.Tests;

/// <summary>The file's chunks and the host's blocks have nothing to do with each other.</summary>
public sealed class XdfBlockSizeTests : IDisposable
{
    private readonly ScratchFolder _folder = new();
    private readonly string _path;

    public XdfBlockSizeTests()
    {
        var draw = new Seeded(20);
        var builder = new XdfBuilder().Stream(1, "array", 3, "100", "float32").Stream(2, "markers", 1, "0", "string");
        var number = 0;
        while (number < 700)
        {
            var rows = new (double? Stamp, double[] Values)[draw.Below(40)];
            for (var i = 0; i < rows.Length; i++, number++)
            {
                rows[i] = (draw.Below(4) == 0 ? (number * 0.01) + (draw.Below(100) * 1e-5) : null, [number, -number, draw.Below(1000)]);
            }

            builder.Samples(1, rows);
            if (draw.Below(2) == 0) builder.Clock(1, number * 0.01, draw.Below(100) * 1e-6);
            if (draw.Below(3) == 0) builder.Markers(2, (number * 0.01, "on"));
            if (draw.Below(5) == 0) builder.Boundary();
        }

        _path = _folder.Write("recording.dat", builder.Bytes);
    }

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(32)]
    [InlineData(1000)]
    public void Rows_stamps_and_clock_measurements_do_not_depend_on_it(int blockRows)
    {
        var one = Played.File(_path, 13);

        var other = Played.File(_path, blockRows);

        Assert.Equal(one.Rows, other.Rows);
        Assert.Equal(one.Stamps, other.Stamps);
        Assert.Equal(one.Clock, other.Clock);
        Assert.Equal(one.Wire, other.Wire);
        Assert.True(one.Clock.Count > 5);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(32)]
    [InlineData(1000)]
    public void Every_block_but_the_last_is_full(int blockRows)
    {
        var played = Played.File(_path, blockRows);

        Assert.All(played.BlockRows.SkipLast(1), rows => Assert.Equal(blockRows, rows));
        Assert.Equal(played.Rows.Count, played.BlockRows.Sum());
        Assert.Equal(Enumerable.Range(0, played.Rows.Count).Select(i => (double)i), played.Rows.Select(row => row[0]));
    }
}
