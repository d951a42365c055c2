using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class XdfDescriptionTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("<channel_count>0</channel_count>", "zero channels")]
    [InlineData("<channel_count>-3</channel_count>", "channel_count -3 is negative")]
    [InlineData("<channel_count>2147483647</channel_count>", "channel_count 2147483647 is more than 65536")]
    [InlineData("<channel_count>many</channel_count>", "channel_count 'many' is not a whole number")]
    [InlineData("<nominal_srate>-250</nominal_srate>", "nominal_srate -250 is negative")]
    [InlineData("<nominal_srate>0</nominal_srate>", "irregular (nominal rate 0)")]
    [InlineData("<nominal_srate>NaN</nominal_srate>", "nominal_srate 'NaN' is not a number")]
    [InlineData("<nominal_srate>2,5</nominal_srate>", "nominal_srate '2,5' is not a number")]
    [InlineData("<channel_format>uint8</channel_format>", "channel_format 'uint8' is none of int8, int16")]
    [InlineData("<channel_format>string</channel_format>", "carries text")]
    [InlineData("<desc><channels><channel><conversion>x</conversion></channel></channels></desc>", "conversion 'x' of channel 1")]
    [InlineData("<desc><channels><channel><conversion>0</conversion></channel></channels></desc>", "conversion '0' of channel 1")]
    public void A_stream_that_cannot_be_a_signal_is_listed_and_refused_with_its_reason(string element, string reason)
    {
        var path = Write("<info>" + element + Rest + "</info>");

        var refusal = Assert.Throws<RefusedException>(() => RecordingFile.Open(path).OpenFeed());

        Assert.Contains(reason, refusal.Message);
        Assert.Contains("'array' #1", refusal.Message);
        Assert.StartsWith(path, refusal.Message);
        Assert.DoesNotContain('\n', refusal.Message);
    }

    [Theory]
    [InlineData("<!DOCTYPE info [<!ENTITY a \"b\">]><info>&a;" + Rest + "</info>")]
    [InlineData("<!DOCTYPE info SYSTEM \"file:///etc/hostname\"><info>" + Rest + "</info>")]
    [InlineData("<info>&undeclared;" + Rest + "</info>")]
    [InlineData("<info><name>cut")]
    [InlineData("<info><name>crossed</info></name>")]
    public void Document_types_entities_and_broken_text_are_refused(string xml)
    {
        var file = RecordingFile.Open(Write(xml));

        Assert.StartsWith("its description can't be read", Assert.Single(file.Streams).Problem);
        Assert.Throws<RefusedException>(() => file.OpenFeed());
    }

    [Fact]
    public void Sixty_four_levels_are_read_and_sixty_five_are_not()
    {
        var inside = RecordingFile.Open(Write(Nested(63)));
        var beyond = RecordingFile.Open(Write(Nested(64)));

        Assert.Equal("", inside.Streams[0].Problem);
        Assert.Contains("more than 64 deep", beyond.Streams[0].Problem);
    }

    [Fact]
    public void A_description_beyond_16_MB_is_not_looked_at()
    {
        var file = RecordingFile.Open(Write("<info>" + Rest + "<desc>" + new string('x', 16 << 20) + "</desc></info>"));

        Assert.Equal("its description is longer than 16 MB", file.Streams[0].Problem);
    }

    [Fact]
    public void A_byte_order_mark_in_front_and_blanks_and_NUL_behind_are_tolerated()
    {
        var file = RecordingFile.Open(Write("\uFEFF <?xml version=\"1.0\"?>\n<info>" + Rest + "</info>\n\0\0"));

        Assert.Equal(("", 2), (file.Streams[0].Problem, file.Streams[0].ChannelCount));
    }

    [Fact]
    public void Positions_come_with_their_channels_labels()
    {
        const string Located = "<desc><channels><channel><label>a</label></channel>"
            + "<channel><label>b</label><location><X>0.4</X><Y>-1.2</Y><Z>0</Z></location></channel></channels></desc>";

        using var feed = RecordingFile.Open(Write("<info>" + Located + Rest + "</info>")).OpenFeed();

        Assert.Equal([("b", 0.4, -1.2)], feed.Positions);
    }

    [Fact]
    public void Labels_are_made_up_where_missing_and_made_unique_where_used_twice()
    {
        var xml = XdfBuilder.Header("array", 4, "10", "int16", XdfBuilder.Channels("a", "a", ""));

        using var feed = RecordingFile.Open(Write(xml)).OpenFeed();

        Assert.Equal(["a", "a-2", "ch3", "ch4"], feed.Format.Channels.Select(channel => channel.Label));
        Assert.Contains(feed.Warnings, warning => warning.What == "channel 2 has a label that is used before: 'a'");
        Assert.Contains(feed.Warnings, warning => warning.What == "2 of 4 channels of 'array' have no label");
    }

    [Fact]
    public void Control_characters_of_a_name_do_not_reach_a_message()
    {
        var xml = XdfBuilder.Header("evil\u001B[2J\u0007name", 1, "-1", "int16");

        var refusal = Assert.Throws<RefusedException>(() => RecordingFile.Open(Write(xml)).OpenFeed());

        Assert.DoesNotContain(refusal.Message, char.IsControl);
        Assert.Contains("evil?[2J?name", refusal.Message);
    }

    [Fact]
    public void Many_small_headers_with_large_claims_cost_little_memory()
    {
        var builder = new XdfBuilder();
        for (var id = 1U; id <= 1500; id++) builder.Stream(id, "s", 65536, "10", "int16", "");
        var path = _folder.Write("claims.dat", builder.Bytes);

        var before = GC.GetAllocatedBytesForCurrentThread();
        var file = RecordingFile.Open(path);

        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 64 << 20);
        Assert.Equal(1024, file.Streams.Count);
        Assert.Contains(file.Warnings, warning => warning.What.StartsWith("more than 1024 streams", StringComparison.Ordinal));
    }

    private const string Rest = "<name>array</name><channel_count>2</channel_count><nominal_srate>10</nominal_srate><channel_format>int16</channel_format>";

    private static string Nested(int levels) =>
        "<info>" + Rest + string.Concat(Enumerable.Repeat("<a>", levels)) + string.Concat(Enumerable.Repeat("</a>", levels)) + "</info>";

    private string Write(string xml) => _folder.Write("described.dat", new XdfBuilder().Text(2, 1, xml).Bytes);
}
