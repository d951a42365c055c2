using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class EdfFeedTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData(false, WireFormat.Int16, -32768, 32767)]
    [InlineData(true, WireFormat.Int24, -8388608, 8388607)]
    public void Numbers_become_physical_values_by_scale_and_offset_of_their_channel(bool isBdf, WireFormat wire, int least, int most)
    {
        var path = Write(new EdfBuilder(isBdf).Signal("r1c1", 3, "mV", "-10", "30", "-4", "4").Signal("r1c2", 3, "uV", $"{least}", $"{most}")
            .Record(EdfBuilder.Numbers(-4, 0, 4), EdfBuilder.Numbers(least, -1, most)));

        using var feed = RecordingFile.Open(path).OpenFeed();
        var played = Played.Feed(feed, 2);

        Assert.Equal([new ChannelFormat("r1c1", "mV", 5, 10), new ChannelFormat("r1c2", "uV")], feed.Format.Channels);
        Assert.Equal(wire, feed.Format.Wire);
        Assert.Equal(3, feed.Format.NominalRateHz);
        Assert.Equal([[-10, least], [10, -1], [30, most]], played.Rows);
        Assert.Empty(played.Warnings);
    }

    [Fact]
    public void A_signal_whose_physical_limits_are_exchanged_is_inverted()
    {
        var path = Write(new EdfBuilder().Signal("r1c1", 2, "uV", "100", "-100", "-1000", "1000").Record(EdfBuilder.Numbers(1000, -500)));

        Assert.Equal([[-100.0], [50.0]], Played.File(path).Rows);
    }

    [Fact]
    public void The_trigger_word_of_bdf_comes_as_its_numbers()
    {
        var path = Write(new EdfBuilder(isBdf: true).Signal("Status", 2, "Boolean", "-1", "1").Record(EdfBuilder.Numbers(0x100003, 0x10FFFF)));

        Assert.Equal([[0x100003], [0x10FFFF]], Played.File(path).Rows);
    }

    [Fact]
    public void Wire_bytes_are_the_numbers_as_they_lie_in_the_file_row_by_row()
    {
        var edf = new EdfBuilder().Signal("a", 2).Signal("b", 2).Record(EdfBuilder.Numbers(1, 2), EdfBuilder.Numbers(-2, 256));
        var bdf = new EdfBuilder(isBdf: true).Signal("a", 2).Signal("b", 2).Record(EdfBuilder.Numbers(1, 65536), EdfBuilder.Numbers(-2, 256));

        Assert.Equal([1, 0, 0xFE, 0xFF, 2, 0, 0, 1], Played.File(Write(edf)).Wire);
        Assert.Equal([1, 0, 0, 0xFE, 0xFF, 0xFF, 0, 0, 1, 0, 1, 0], Played.File(Write(bdf)).Wire);
    }

    [Fact]
    public void Without_annotations_records_follow_each_other_from_zero()
    {
        var path = Write(new EdfBuilder { RecordSeconds = "0.5" }.Signal("a", 2).Record(EdfBuilder.Numbers(1, 2)).Record(EdfBuilder.Numbers(3, 4)));

        var played = Played.File(path);

        Assert.Equal([0, 0.25, 0.5, 0.75], played.Stamps);
        Assert.Equal([1, 2, 3, 4], played.Rows.Select(row => row[0]));
    }

    [Fact]
    public void Signals_of_one_rate_are_one_stream_and_the_largest_is_the_first()
    {
        var path = Write(new EdfBuilder().Signal("pulse", 1).Signal("r1c1", 4).Signal("breath", 2).Signal("r1c2", 4)
            .Record(EdfBuilder.Numbers(9), EdfBuilder.Numbers(1, 2, 3, 4), EdfBuilder.Numbers(7, 8), EdfBuilder.Numbers(-1, -2, -3, -4))
            .Record(EdfBuilder.Numbers(8), EdfBuilder.Numbers(5, 6, 7, 8), EdfBuilder.Numbers(5, 6), EdfBuilder.Numbers(-5, -6, -7, -8)));

        var file = RecordingFile.Open(path);

        Assert.Equal(["'4 Hz' #1 (signals, 2 channels, 4 Hz, int16)", "'1 Hz' #2 (signals, 1 channels, 1 Hz, int16)", "'2 Hz' #3 (signals, 1 channels, 2 Hz, int16)"],
            file.Streams.Select(stream => stream.ToString()));
        Assert.Equal([8, 2, 4], file.Streams.Select(stream => stream.RowCount));
        Assert.Contains("say which one by its name: '4 Hz' #1", Assert.Throws<RefusedException>(() => file.OpenFeed()).Message);
        Assert.Equal([1, 2, 3, 4, 5, 6, 7, 8], Played.File(path, 3, "4 Hz").Rows.Select(row => row[0]));
        Assert.Equal([-1, -2, -3, -4, -5, -6, -7, -8], Played.File(path, 3, "#1").Rows.Select(row => row[1]));
        Assert.Equal([0, 0.5, 1, 1.5], Played.File(path, 3, "#3").Stamps);
        Assert.Equal([9, 8], Played.File(path, 3, "1 Hz").Rows.Select(row => row[0]));
    }

    [Fact]
    public void Annotations_are_listed_and_are_no_signal()
    {
        var path = Write(EdfBuilder.Plus("C").Annotations().Signal("a", 2).Annotations().Record(EdfBuilder.Time("+0"), EdfBuilder.Numbers(1, 2), ""));

        var file = RecordingFile.Open(path);

        Assert.Equal(
            ["'2 Hz' #1 (signals, 1 channels, 2 Hz, int16)", "'annotations' #2 (Markers, 1 channels, irregular, text)"],
            file.Streams.Select(stream => stream.ToString()));
        Assert.Equal([2, null], file.Streams.Select(stream => stream.RowCount));
        Assert.Contains("it carries text", Assert.Throws<RefusedException>(() => file.OpenFeed("annotations")).Message);
        Assert.Equal([[1.0], [2.0]], Played.File(path).Rows);
    }

    [Theory]
    [InlineData("uV", "uV")]
    [InlineData("\u00B5V", "\u00B5V")]
    [InlineData("\u00C2\u00B5V", "\u00B5V")]
    [InlineData("degC", "degC")]
    public void Units_are_as_the_file_has_them_and_the_micro_sign_may_be_of_either_encoding(string written, string read)
    {
        using var feed = RecordingFile.Open(Write(new EdfBuilder().Signal("a", 1, written).Record(EdfBuilder.Numbers(1)))).OpenFeed();

        Assert.Equal(read, feed.Format.Channels[0].Unit);
        Assert.Empty(feed.Warnings);
    }

    [Theory]
    [InlineData("B\u00F6r", "B\u00F6r")]
    [InlineData("B\u00C3\u00B6r", "B\u00F6r")]
    public void Labels_beyond_ascii_are_read_in_either_encoding_with_a_warning(string written, string read)
    {
        using var feed = RecordingFile.Open(Write(new EdfBuilder().Signal(written, 1).Record(EdfBuilder.Numbers(1)))).OpenFeed();

        Assert.Equal(read, feed.Format.Channels[0].Label);
        Assert.Contains("byte 256", Assert.Single(feed.Warnings).Where);
    }

    [Fact]
    public void Labels_that_are_missing_or_used_twice_are_made_unique_with_a_warning()
    {
        var path = Write(new EdfBuilder().Signal("a", 1).Signal("a", 1).Signal("", 1).Record(EdfBuilder.Numbers(1), EdfBuilder.Numbers(2), EdfBuilder.Numbers(3)));

        using var feed = RecordingFile.Open(path).OpenFeed();

        Assert.Equal(["a", "a-2", "ch3"], feed.Format.Channels.Select(channel => channel.Label));
        Assert.Equal(2, feed.Warnings.Count);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Nobody_sees_who_was_recorded_with_what(bool isBdf)
    {
        var path = Write(new EdfBuilder(isBdf).Signal("a", 1, "").Signal("a", 0).Record(EdfBuilder.Numbers(1), Array.Empty<int>()).Raw(1));

        var file = RecordingFile.Open(path);
        using var feed = file.OpenFeed();

        var said = string.Join("\n", file.Streams.Select(stream => stream.ToString()).Concat(feed.Warnings.Select(warning => warning.ToString())))
            + string.Join("\n", feed.Format.Channels) + string.Join("\n", feed.Stream.Channels);
        Assert.Contains("unit unknown", said);
        Assert.DoesNotContain(EdfBuilder.Secret, said);
        Assert.DoesNotContain("2112", said);
    }

    [Fact]
    public void A_data_record_larger_than_any_buffer_is_read_piece_by_piece()
    {
        const int Samples = 700_000;
        int[] values = [.. Enumerable.Range(0, Samples).Select(i => (i * 7 % 65521) - 32768)];
        int[] others = [.. values.Select(value => -1 - value)];
        var path = Write(EdfBuilder.Plus("C").Signal("a", Samples).Annotations().Signal("b", Samples)
            .Record(values, EdfBuilder.Time("+0"), others).Record(others, EdfBuilder.Time("+1"), values));

        var played = Played.File(path, 1000);

        Assert.Equal(values.Concat(others).Select(value => (double)value), played.Rows.Select(row => row[0]));
        Assert.Equal(others.Concat(values).Select(value => (double)value), played.Rows.Select(row => row[1]));
        Assert.Equal(1 + (1.0 * (Samples - 1) / Samples), played.Stamps[^1]);
    }

    [Fact]
    public void A_pull_allocates_nothing()
    {
        var builder = EdfBuilder.Plus("C", "0.1").Signal("a", 50).Signal("b", 50).Annotations();
        for (var i = 0; i < 300; i++) builder.Record(new int[50], new int[50], EdfBuilder.Time(FormattableString.Invariant($"+{i / 10}.{i % 10}")));
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
    public void A_closed_feed_and_a_block_for_other_channels_are_refused()
    {
        var feed = RecordingFile.Open(Write(new EdfBuilder().Signal("a", 1).Record(EdfBuilder.Numbers(1)))).OpenFeed();
        var block = new SampleBlock(new StreamFormat("other", 10, WireFormat.Int16, [new("a", ""), new("b", "")]), 1);

        Assert.Throws<ArgumentException>(() => feed.Pull(block, TimeSpan.Zero));
        feed.Dispose();
        Assert.Throws<ObjectDisposedException>(() => feed.Pull(block, TimeSpan.Zero));
    }

    private string Write(EdfBuilder builder) => _folder.Write("recording.dat", builder.Bytes);
}
