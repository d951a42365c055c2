using System.Xml.Linq;
using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

/// <summary>What the writer wrote, as the reader reads it.</summary>
public sealed class XdfWriterTests : IDisposable
{
    private const double RateHz = 250;
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData(WireFormat.Int16)]
    [InlineData(WireFormat.Int32)]
    [InlineData(WireFormat.Float32)]
    [InlineData(WireFormat.Float64)]
    public void Every_row_comes_back_with_its_stamp(WireFormat wire)
    {
        var path = _folder.Path("whole.xdf");
        Write(path, wire, seconds: 25);

        var played = Played.File(path, blockRows: 64);

        Assert.Empty(played.Warnings);
        Assert.Equal(25 * 250, played.Rows.Count);
        for (var i = 0; i < played.Rows.Count; i++)
        {
            Assert.Equal(Row(i), played.Rows[i]);
            Assert.Equal(Stamp(i), played.Stamps[i], 1e-6);
        }
    }

    [Fact]
    public void The_description_says_what_the_head_said()
    {
        var path = _folder.Path("described.xdf");
        Write(path, WireFormat.Int16, seconds: 1);

        var file = RecordingFile.Open(path);

        Assert.Equal(["array", "truth"], file.Streams.Select(stream => stream.Name));
        using var feed = file.OpenFeed("array");
        Assert.Equal(RateHz, feed.Format.NominalRateHz);
        Assert.Equal(["a & b", "c"], feed.Format.Channels.Select(channel => channel.Label));
        Assert.All(feed.Format.Channels, channel => Assert.Equal(("microvolts", 0.5), (channel.Unit, channel.Scale)));
        Assert.Equal([("a & b", 0.4, -1.25)], feed.Positions);
    }

    [Fact]
    public void A_gap_in_the_stamps_comes_back_as_a_gap()
    {
        var path = _folder.Path("gap.xdf");
        using (var writer = new XdfWriter(path, [Head(WireFormat.Int16)]))
        {
            for (var i = 0; i < 100; i++) writer.Append(0, Stamp(i < 40 ? i : i + 11), Row(i));
        }

        var played = Played.File(path);

        Assert.Equal(Stamp(39), played.Stamps[39], 1e-6);
        Assert.Equal(Stamp(51), played.Stamps[40], 1e-6);
        Assert.Equal(Stamp(110), played.Stamps[99], 1e-6);
    }

    /// <summary>Whoever dies leaves at least what was there half a second before.</summary>
    [Fact]
    public void A_file_whose_writer_died_can_be_read_up_to_its_last_half_second()
    {
        var path = _folder.Path("dead.xdf");
        using var writer = new XdfWriter(path, [Head(WireFormat.Int16)]);
        for (var i = 0; i < 1130; i++) writer.Append(0, Stamp(i), Row(i));
        File.Copy(path, _folder.Path("copy.xdf"));

        var played = Played.File(_folder.Path("copy.xdf"));

        Assert.Empty(played.Warnings);
        Assert.InRange(played.Rows.Count, 1130 - 125, 1130);
        Assert.Equal(Row(played.Rows.Count - 1), played.Rows[^1]);
    }

    [Fact]
    public void Damage_costs_no_more_than_the_way_to_the_next_boundary()
    {
        var path = _folder.Path("whole.xdf");
        Write(path, WireFormat.Int16, seconds: 35);
        var bytes = File.ReadAllBytes(path);
        bytes.AsSpan(bytes.Length / 2, 60).Fill(0xFF);

        var played = Played.File(_folder.Write("damaged.xdf", bytes));

        Assert.NotEmpty(played.Warnings);
        Assert.InRange(played.Rows.Count, (35 * 250) - (11 * 250), (35 * 250) - 1);
        Assert.Equal(Stamp((35 * 250) - 1), played.Stamps[^1], 1e-6);
    }

    [Fact]
    public void Markers_are_kept_with_their_stamps_and_texts()
    {
        var path = _folder.Path("markers.xdf");
        Write(path, WireFormat.Int16, seconds: 3);

        var bytes = File.ReadAllBytes(path);

        foreach (var text in (string[])["{\"kind\":\"planar\"}", "zwölf µV"])
        {
            var at = bytes.AsSpan().IndexOf(System.Text.Encoding.UTF8.GetBytes(text));
            Assert.True(at > 0, text);
            var length = System.Text.Encoding.UTF8.GetByteCount(text);
            Assert.Equal(length, BitConverter.ToInt32(bytes, at - 4));
            Assert.Equal(8, bytes[at - 14]);
            Assert.Equal(Stamp(text[0] == '{' ? 100 : 600), BitConverter.ToDouble(bytes, at - 13));
        }
    }

    [Fact]
    public void The_same_rows_give_the_same_bytes()
    {
        Write(_folder.Path("one.xdf"), WireFormat.Int16, seconds: 12);
        Write(_folder.Path("two.xdf"), WireFormat.Int16, seconds: 12);

        Assert.Equal(File.ReadAllBytes(_folder.Path("one.xdf")), File.ReadAllBytes(_folder.Path("two.xdf")));
    }

    [Fact]
    public void Clock_offsets_never_share_an_instant()
    {
        var path = _folder.Path("clock.xdf");
        Write(path, WireFormat.Int16, seconds: 12);

        var times = Played.File(path).Clock.Select(measurement => measurement.RemoteSeconds).ToList();

        Assert.True(times.Count >= 3);
        Assert.Equal(times.Distinct().Order(), times);
    }

    [Fact]
    public void Counts_are_rounded_and_stay_within_their_range()
    {
        var path = _folder.Path("range.xdf");
        using (var writer = new XdfWriter(path, [Head(WireFormat.Int16)]))
        {
            writer.Append(0, 1, [1e9, -1e9]);
            writer.Append(0, 1.004, [0.74, double.NaN]);
        }

        var played = Played.File(path);

        Assert.Equal([32767 * 0.5, -32768 * 0.5], played.Rows[0]);
        Assert.Equal([0.5, 0], played.Rows[1]);
    }

    [Fact]
    public void Nothing_is_overwritten_and_no_folder_is_made()
    {
        var there = _folder.Write("there.xdf", "mine");

        Assert.Contains("there already", Assert.Throws<RefusedException>(() => new XdfWriter(there, [Head(WireFormat.Int16)])).Message, StringComparison.Ordinal);
        Assert.Throws<RefusedException>(() => new XdfWriter(_folder.Path("none/new.xdf"), [Head(WireFormat.Int16)]));
        Assert.Equal("mine", File.ReadAllText(there));
    }

    private static double Stamp(int row) => 5000 + (row / RateHz);

    private static double[] Row(int row) => [0.5 * (row % 30_000), -0.5 * ((row * 7) % 1000)];

    private static XdfStreamHead Head(WireFormat wire) => new()
    {
        Name = "array",
        Type = "LFP",
        RateHz = RateHz,
        Wire = wire,
        Channels = [new("a & b", "microvolts", 0.5, 0.4, -1.25), new("c", "microvolts", 0.5, double.NaN, double.NaN)],
        Notes = [new XElement("synthetic", new XElement("is_synthetic", "true"))],
    };

    private static void Write(string path, WireFormat wire, int seconds)
    {
        using var writer = new XdfWriter(path, [Head(wire), XdfStreamHead.Markers("truth")]);
        for (var i = 0; i < seconds * RateHz; i++)
        {
            if (i == 100) writer.Append(1, Stamp(i), "{\"kind\":\"planar\"}");
            if (i == 600) writer.Append(1, Stamp(i), "zwölf µV");
            writer.Append(0, Stamp(i), Row(i));
        }
    }
}
