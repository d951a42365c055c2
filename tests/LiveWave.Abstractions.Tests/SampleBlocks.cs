namespace LiveWave.Abstractions.Tests;

public sealed class SampleBlocks
{
    private static readonly StreamFormat Format = new("array", 1000, WireFormat.Int16, [new("a", "microvolts"), new("b", "microvolts")]);

    [Fact]
    public void A_block_gives_back_rows_and_stamps_as_the_feed_put_them_in()
    {
        var block = new SampleBlock(Format, 3);

        block.Begin(firstReceived: 40);
        Fill(block.Append(1.5), 1, 2);
        Fill(block.Append(1.7), 3, double.NaN);
        block.AppendWire([1, 2, 3]);
        block.AppendClock(new ClockMeasurement(40, 9, 8, 1, 0.001));

        Assert.Equal(2, block.Count);
        Assert.Equal(40, block.FirstReceived);
        Assert.Equal([3, double.NaN], block.Row(1).ToArray());
        Assert.Equal(1.7, block.RawStampSeconds(1));
        Assert.Equal([1, 2, 3], block.Wire.ToArray());
        Assert.Equal(1, Assert.Single(block.ClockMeasurements.ToArray()).OffsetSeconds);
    }

    [Fact]
    public void Beginning_anew_empties_a_block()
    {
        var block = new SampleBlock(Format, 3);
        block.Begin(0);
        Fill(block.Append(1), 1, 2);
        block.AppendWire([1]);
        block.AppendClock(default);

        block.Begin(1, afterRestart: true);

        Assert.Equal(0, block.Count);
        Assert.True(block.Wire.IsEmpty && block.ClockMeasurements.IsEmpty);
        Assert.True(block.AfterRestart);
    }

    [Fact]
    public void A_full_block_takes_no_more()
    {
        var block = new SampleBlock(Format, 1);
        block.Begin(0);
        _ = block.Append(0);

        Assert.Throws<InvalidOperationException>(() => block.Append(1));
    }

    [Fact]
    public void Filling_a_block_again_allocates_nothing()
    {
        var block = new SampleBlock(Format, 100);
        FillUp(block);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 100; i++) FillUp(block);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(60)]
    [InlineData(511)]
    [InlineData(512)]
    [InlineData(1024)]
    [InlineData(1032)]
    public void A_padded_row_holds_its_channels_in_whole_cache_lines_and_is_no_multiple_of_a_page(int channels)
    {
        var length = RowLength.Padded(channels);

        Assert.True(length >= channels);
        Assert.Equal(0, length % 8);
        Assert.NotEqual(0, length * sizeof(double) % 4096);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void A_rate_that_is_not_above_zero_is_refused(double rateHz) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new StreamFormat("x", rateHz, WireFormat.Float32, Format.Channels));

    private static void FillUp(SampleBlock block)
    {
        block.Begin(0);
        for (var i = 0; i < block.Capacity; i++) Fill(block.Append(i), i, i);
        block.AppendWire([1, 2, 3, 4]);
    }

    private static void Fill(Span<double> row, double a, double b)
    {
        row[0] = a;
        row[1] = b;
    }
}
