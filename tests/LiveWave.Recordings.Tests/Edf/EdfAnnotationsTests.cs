using System.Globalization;
using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

/// <summary>In the texts here | stands for 0x14, ~ for 0x15 and _ for 0x00.</summary>
public sealed class EdfAnnotationsTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("+0||_", "")]
    [InlineData("+0||_+1.5|cue|_", "1.5 cue")]
    [InlineData("+0||_+1~0.5|cue|_", "1 cue")]
    [InlineData("+0||_-0.25|before|_", "-0.25 before")]
    [InlineData("+0||_+1|one|two|_", "1 one, 1 two")]
    [InlineData("+0|||_+1||_+2|cue|_", "2 cue")]
    [InlineData("+0||begin|_", "0 begin")]
    [InlineData("+0||____+3|after blanks|__", "3 after blanks")]
    [InlineData("+0||_+3|third|_+1|first|_+3|again|_", "1 first, 3 third, 3 again")]
    [InlineData("+0||_+1|last in its signal|", "1 last in its signal")]
    [InlineData("+0||_+999999|far outside|_", "999999 far outside")]
    [InlineData("+0||_+1|\u00B5V Stra\u00DFe|_", "1 \u00B5V Stra\u00DFe")]
    public void Lists_of_annotations_are_read(string written, string read)
    {
        var annotations = Read(written);

        Assert.Equal(read, Shown(annotations));
        Assert.Empty(annotations.Warnings);
    }

    [Theory]
    [InlineData("+0||_1|no sign|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+1,5|comma|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+1e3|exponent|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+ 1|blank|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+.5|no digit|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+|nothing|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+9999999999|after all|_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_no mark_+2|cue|_", "2 cue", 5)]
    [InlineData("+0||_+1|whole|cut_+2|cue|_", "1 whole, 2 cue", 5)]
    [InlineData("cue|_+2|cue|_", "2 cue", 0)]
    public void What_can_not_be_read_is_left_out_and_told_and_costs_nothing_behind_it(string written, string read, int at)
    {
        var annotations = Read(written);

        Assert.Equal(read, Shown(annotations));
        var warning = Assert.Single(annotations.Warnings);
        Assert.EndsWith($", byte {768 + 2 + at}", warning.Where, StringComparison.Ordinal);
        Assert.Equal("1 annotations can't be read; this is the first", warning.What);
    }

    [Fact]
    public void Letters_that_are_no_utf8_are_replaced_and_told()
    {
        byte[] text = [.. "+0\u0014\u0014\0+1\u0014"u8, 0xB5, (byte)'V', 0x14];

        var annotations = EdfAnnotations.Read(Write(EdfBuilder.Plus("C").Signal("a", 1).Annotations(40).Record(EdfBuilder.Numbers(1), text)));

        Assert.Equal("1 \uFFFDV", Shown(annotations));
        Assert.Contains("not UTF-8", Assert.Single(annotations.Warnings).What);
    }

    [Fact]
    public void Every_annotation_signal_of_every_record_is_read_in_bdf_too()
    {
        var path = Write(new EdfBuilder(isBdf: true) { Reserved = "BDF+C" }.Annotations().Signal("a", 1).Annotations()
            .Record(Bytes("+0||_+0.5|one|_"), EdfBuilder.Numbers(1), Bytes("+0.25|two|_"))
            .Record(Bytes("+1||_"), EdfBuilder.Numbers(2), Bytes("+1.25|three|_")));

        Assert.Equal("0.25 two, 0.5 one, 1.25 three", Shown(EdfAnnotations.Read(path)));
        Assert.Equal([0, 1.0], Played.File(path).Stamps);
    }

    [Fact]
    public void Annotations_beyond_the_bound_are_counted()
    {
        var many = new StringBuilder("+0||_");
        for (var i = 0; i < 5001; i++) many.Append("+1|a|_");
        var builder = EdfBuilder.Plus("C").Signal("a", 1).Annotations(16000);
        for (var record = 0; record < 20; record++) builder.Record(EdfBuilder.Numbers(1), Bytes(many.ToString()));

        var annotations = EdfAnnotations.Read(Write(builder));

        Assert.Equal(EdfAnnotations.Most, annotations.Markers.Count);
        Assert.Equal(20, annotations.LeftOut);
        Assert.Contains("20 are left out", Assert.Single(annotations.Warnings).What);
    }

    [Fact]
    public void An_annotation_signal_longer_than_the_buffer_is_read_up_to_it()
    {
        var long1 = new string('x', 140_000);
        var path = Write(EdfBuilder.Plus("C").Signal("a", 1).Annotations(80_000).Record(EdfBuilder.Numbers(1), Bytes($"+0||_+1|cue|_+2|{long1}|_")));

        var annotations = EdfAnnotations.Read(path);

        Assert.Equal("1 cue", Shown(annotations));
        Assert.Contains("28928 bytes skipped", annotations.Warnings[0].Advice);
    }

    [Fact]
    public void Other_files_have_none()
    {
        Assert.Empty(EdfAnnotations.Read(Write(new EdfBuilder().Signal("a", 1).Record(EdfBuilder.Numbers(1)))).Markers);
        Assert.Throws<RefusedException>(() => EdfAnnotations.Read(_folder.Write("recording.xdf", new XdfBuilder().Bytes)));
    }

    private EdfAnnotations Read(string written)
    {
        var bytes = Bytes(written);
        return EdfAnnotations.Read(Write(EdfBuilder.Plus("C").Signal("a", 1).Annotations((bytes.Length + 1) / 2).Record(EdfBuilder.Numbers(1), bytes)));
    }

    private static byte[] Bytes(string written) => Encoding.UTF8.GetBytes(written.Replace('|', '\u0014').Replace('~', '\u0015').Replace('_', '\0'));

    private static string Shown(EdfAnnotations annotations) =>
        string.Join(", ", annotations.Markers.Select(marker => marker.StampSeconds.ToString(CultureInfo.InvariantCulture) + " " + marker.Text));

    private string Write(EdfBuilder builder) => _folder.Write("recording.dat", builder.Bytes);
}
