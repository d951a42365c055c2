using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class XdfFeedTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("int8", WireFormat.Int8, -128, 127)]
    [InlineData("int16", WireFormat.Int16, -32768, 32767)]
    [InlineData("int32", WireFormat.Int32, -2147483648, 2147483647)]
    [InlineData("int64", WireFormat.Int64, -9007199254740992, 9007199254740991)]
    [InlineData("float32", WireFormat.Float32, -1.5, 0.25)]
    [InlineData("double64", WireFormat.Float64, -0.1, 1e300)]
    public void Every_number_format_comes_back_as_it_was_written(string format, WireFormat wire, double low, double high)
    {
        var path = Write(new XdfBuilder().Stream(7, "array", 2, "100", format).Samples(7, (5.0, [low, high]), (null, [high, 0])));

        using var feed = RecordingFile.Open(path).OpenFeed();
        var played = Played.Feed(feed, 10);

        Assert.Equal(wire, feed.Format.Wire);
        Assert.Equal([[low, high], [high, 0]], played.Rows);
    }

    [Fact]
    public void Values_are_numbers_times_conversion_in_the_stated_unit()
    {
        const string Description = "<channels><channel><label>r1c1</label><unit>microvolts</unit><conversion>0.05</conversion></channel>"
            + "<channel><label>r1c2</label><unit>mV</unit></channel></channels>";
        var path = Write(new XdfBuilder().Stream(1, "array", 2, "1000", "int16", Description).Samples(1, (1.0, [-7, -7])));

        using var feed = RecordingFile.Open(path).OpenFeed();
        var played = Played.Feed(feed, 1);

        Assert.Equal([-7 * 0.05, -7], played.Rows[0]);
        Assert.Equal([new ChannelFormat("r1c1", "microvolts", 0.05), new ChannelFormat("r1c2", "mV")], feed.Format.Channels);
        Assert.Equal("array", feed.Format.Name);
        Assert.Equal(1000, feed.Format.NominalRateHz);
    }

    [Fact]
    public void A_value_that_is_not_a_number_stays_missing()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 2, "10", "float32").Samples(1, (1.0, [double.NaN, 3])));

        var played = Played.File(path);

        Assert.Equal([double.NaN, 3], played.Rows[0]);
    }

    [Fact]
    public void A_sample_without_a_stamp_comes_one_period_after_the_one_before_also_across_chunks()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "250", "int16")
            .Samples(1, (5.0, [1]), (null, [2])).Clock(1, 5, 0).Samples(1, (null, [3]), (7.5, [4]), (null, [5])));

        var played = Played.File(path);

        const double Period = 1 / 250.0;
        Assert.Equal([5.0, 5.0 + Period, 5.0 + Period + Period, 7.5, 7.5 + Period], played.Stamps);
    }

    [Fact]
    public void Before_the_first_stamp_time_begins_at_zero()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int8").Samples(1, (null, [1]), (null, [2])));

        Assert.Equal([0.1, 0.2], Played.File(path).Stamps);
    }

    [Fact]
    public void A_stamp_of_exactly_zero_is_a_stamp()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int8").Samples(1, (3.0, [1]), (0.0, [2])));

        Assert.Equal([3.0, 0.0], Played.File(path).Stamps);
    }

    [Fact]
    public void Wire_bytes_are_the_numbers_as_they_lie_in_the_file()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 2, "10", "int16").Samples(1, (3.0, [1, -2]), (null, [256, 3])));

        Assert.Equal([1, 0, 0xFE, 0xFF, 0, 1, 3, 0], Played.File(path).Wire);
    }

    [Fact]
    public void Other_streams_in_between_change_nothing()
    {
        var path = Write(new XdfBuilder()
            .Stream(1, "array", 1, "10", "int16").Stream(2, "markers", 1, "0", "string").Stream(3, "slow", 2, "1", "float32")
            .Samples(3, (1.0, [9, 9])).Samples(1, (1.0, [1])).Markers(2, (1.05, "stimulus-on"), (1.1, ""))
            .Clock(3, 1, 5).Boundary().Samples(3, (2.0, [8, 8])).Samples(1, (null, [2])).Footer(3).Footer(1).Footer(2));

        var array = Played.File(path, stream: "array");
        var slow = Played.File(path, stream: "slow");

        Assert.Equal([[1.0], [2.0]], array.Rows);
        Assert.Empty(array.Clock);
        Assert.Equal([[9.0, 9.0], [8.0, 8.0]], slow.Rows);
        Assert.Empty(array.Warnings);
    }

    [Fact]
    public void A_clock_offset_is_known_from_the_row_behind_it()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16")
            .Clock(1, 100, -0.5).Samples(1, (100.0, [1]), (null, [2])).Clock(1, 105, -0.25).Samples(1, (null, [3])).Clock(1, 110, 0));

        var played = Played.File(path);

        Assert.Equal([(0L, 99.5, 100.0, -0.5), (2L, 104.75, 105.0, -0.25)],
            played.Clock.Select(one => (one.FromReceived, one.TakenSeconds, one.RemoteSeconds, one.OffsetSeconds)));
        Assert.All(played.Clock, one => Assert.True(double.IsNaN(one.UncertaintySeconds)));
    }

    [Fact]
    public void A_clock_offset_that_is_not_a_number_is_left_out_with_a_warning()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Clock(1, 100, double.NaN).Samples(1, (100.0, [1])));

        var played = Played.File(path);

        Assert.Empty(played.Clock);
        Assert.Contains("clock offset that is not a number", played.Warned);
    }

    [Fact]
    public void A_stream_that_begins_anew_is_a_restart_and_the_block_ends_before_it()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]), (null, [2]), (null, [3]))
            .Text(2, 1, XdfBuilder.Header("array", 1, "10", "int16", XdfBuilder.Numbered(1) + "<later/>")).Samples(1, (50.0, [4]), (null, [5])));

        var played = Played.File(path, blockRows: 2);

        Assert.Equal([3L], played.Restarts);
        Assert.Equal([2, 1, 2], played.BlockRows);
        Assert.Equal([1, 2, 3, 4, 5], played.Rows.Select(row => row[0]));
    }

    [Fact]
    public void The_same_header_again_changes_nothing()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]))
            .Stream(1, "array", 1, "10", "int16").Samples(1, (null, [2])));

        var played = Played.File(path);

        Assert.Equal(2, played.Rows.Count);
        Assert.Empty(played.Restarts);
        Assert.Contains("a second header of stream 1, the same again", RecordingFile.Open(path).Warnings[0].What);
    }

    [Fact]
    public void A_header_that_changes_the_form_ends_the_stream_with_a_warning()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]))
            .Stream(1, "array", 2, "10", "int16").Samples(1, (2.0, [2, 3])));

        var played = Played.File(path);

        Assert.Single(played.Rows);
        Assert.Contains("changes its form", played.Warned);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    [InlineData(8)]
    public void A_length_may_be_written_longer_than_it_need_be(int lengthBytes)
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int8");
        builder.Chunk(3, [1, 0, 0, 0, 8, 1, 0, 0, 0, 0, 0, 0, 0, 0, 42], lengthBytes);

        Assert.Equal([[42.0]], Played.File(Write(builder)).Rows);
    }

    [Fact]
    public void A_sample_longer_than_the_usual_buffer_is_read()
    {
        const int Channels = 20000;
        double[] values = [.. Enumerable.Range(0, Channels).Select(i => (double)i)];
        var path = Write(new XdfBuilder().Stream(1, "array", Channels, "10", "double64").Samples(1, (1.0, values), (null, values)));

        var played = Played.File(path);

        Assert.Equal([values, values], played.Rows);
    }

    [Fact]
    public void A_pull_of_sound_chunks_allocates_nothing()
    {
        var builder = new XdfBuilder().Stream(1, "array", 8, "1000", "int16").Stream(2, "markers", 1, "0", "string");
        for (var chunk = 0; chunk < 300; chunk++)
        {
            var stamp = (double)chunk;
            builder.Samples(1, [.. Enumerable.Range(0, 50).Select(i => (i == 0 ? (double?)stamp : null, new double[8]))]);
            builder.Markers(2, (stamp, "on")).Clock(1, stamp, 0).Clock(2, stamp, 0);
            if (chunk % 10 == 0) builder.Boundary();
        }

        using var feed = RecordingFile.Open(Write(builder)).OpenFeed();
        var block = new SampleBlock(feed.Format, 32);
        for (var i = 0; i < 10; i++) feed.Pull(block, TimeSpan.Zero);
        var before = GC.GetAllocatedBytesForCurrentThread();
        var rows = 0;
        for (var i = 0; i < 400; i++)
        {
            feed.Pull(block, TimeSpan.Zero);
            rows += block.Count;
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
        Assert.Equal(400 * 32, rows);
    }

    [Fact]
    public void A_closed_feed_says_so()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1])));
        var feed = RecordingFile.Open(path).OpenFeed();
        var block = new SampleBlock(feed.Format, 1);

        feed.Dispose();

        Assert.Throws<ObjectDisposedException>(() => feed.Pull(block, TimeSpan.Zero));
    }

    [Fact]
    public void A_block_for_other_channels_is_refused()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1])));
        using var feed = RecordingFile.Open(path).OpenFeed();
        var block = new SampleBlock(new StreamFormat("other", 10, WireFormat.Int16, [new("a", ""), new("b", "")]), 1);

        Assert.Throws<ArgumentException>(() => feed.Pull(block, TimeSpan.Zero));
    }

    private string Write(XdfBuilder builder) => _folder.Write("recording.dat", builder.Bytes);
}
