namespace LiveWave.Recordings.Tests;

/// <summary>The file's data records and the host's blocks have nothing to do with each other.</summary>
public sealed class EdfBlockSizeTests : IDisposable
{
    private readonly ScratchFolder _folder = new();
    private readonly string _path;

    public EdfBlockSizeTests()
    {
        var builder = EdfBuilder.Plus("D", "0.17").Signal("a", 17).Annotations().Signal("b", 17).Signal("slow", 5);
        var hundredths = 25;
        for (var record = 0; record < 40; record++)
        {
            var first = record * 17;
            int[] numbers = [.. Enumerable.Range(first, 17)];
            builder.Record(numbers, EdfBuilder.Time($"+{hundredths / 100}.{hundredths % 100:00}"), numbers.Select(number => -number).ToArray(), new int[5]);
            hundredths += record % 7 == 0 ? 317 : 17;
        }

        _path = _folder.Write("recording.dat", builder.Bytes);
    }

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(32)]
    [InlineData(1000)]
    public void Rows_stamps_and_wire_bytes_do_not_depend_on_it_and_every_block_but_the_last_is_full(int blockRows)
    {
        var one = Played.File(_path, 13, "#1");

        var other = Played.File(_path, blockRows, "#1");

        Assert.Equal(one.Rows, other.Rows);
        Assert.Equal(one.Stamps, other.Stamps);
        Assert.Equal(one.Wire, other.Wire);
        Assert.All(other.BlockRows.SkipLast(1), rows => Assert.Equal(blockRows, rows));
        Assert.Equal(Enumerable.Range(0, 680).Select(i => (double)i), other.Rows.Select(row => row[0]));
        Assert.Equal(0.25, other.Stamps[0]);
    }
}
