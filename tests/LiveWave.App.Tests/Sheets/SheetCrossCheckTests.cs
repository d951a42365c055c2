using LiveWave.Abstractions;

namespace LiveWave.App.Tests;

/// <summary>What one key alone can't tell.</summary>
public sealed class SheetCrossCheckTests
{
    private const string Limits =
        "[limits]\npulsesPerMinute = 60\npulsesPerSession = 60\nshortestIntervalMs = 1000\nlongestRunMinutes = 10\noldestDataMs = 50\n[[rule]]";

    [Theory]
    [InlineData("[[rule]]", "[[patch]]\nname = \"quill\"\nelectrodes = \"b.tsv\"\n[[rule]]", "19: patch.name: 'quill' is taken in line 8")]
    [InlineData("[[rule]]", "[[band.wave]]\nestimator = \"planar\"\n[[rule]]", "19: band.wave.estimator: 'planar' is taken in line 16")]
    [InlineData("patch = \"quill\"", "patch = \"quil\"", "20: rule.patch: there is no 'quil'; did you mean 'quill'? allowed: quill")]
    [InlineData("band = \"beta\"", "band = \"gamma\"", "21: rule.band: there is no 'gamma'; allowed: beta")]
    [InlineData("kind = \"planar\"", "kind = \"planar\"\nwave = \"rotating\"", "23: rule.wave: there is no 'rotating'; allowed: planar")]
    [InlineData("kind = \"planar\"", "kind = \"planar\"\noutputs = [\"lamp\"]", "23: rule.outputs: there is no 'lamp'; there is none in this sheet")]
    [InlineData("kind = \"planar\"", "kind = \"planar\"\ndirectionDegrees = 135", "23: rule.directionDegrees: toleranceDegrees is missing")]
    [InlineData("kind = \"planar\"", "kind = \"planar\"\ntoleranceDegrees = 30", "23: rule.toleranceDegrees: directionDegrees is missing")]
    [InlineData("highHz = 22", "highHz = 14", "14: band.highHz: it is not above lowHz; give a number above 14 (Hz)")]
    [InlineData("[stream]", "[stream]\nrateHz = 44", "15: band.highHz: it is not below half the stream's rate; give a number below 22 (Hz)")]
    [InlineData("[stream]", "[stream]\nrateHz = 28", "14: band.lowHz: it is not below half the stream's rate; give a number below 14 (Hz)")]
    [InlineData("name = \"quill\"", "name = \"quill\"\nchannels = []", "9: patch.channels: it is empty")]
    [InlineData("name = \"quill\"", "name = \"quill\"\nchannels = [\"a1\"]\nbadChannels = [\"a2\"]", "10: patch.badChannels: 'a2' is not a channel of this patch")]
    [InlineData("[stream]", "[stream]\nrateHz = 100\n[conditioning]\nmainsHz = 50\n[session.x]", "7: conditioning.mainsHz: it is not below half the stream's rate")]
    [InlineData(
        "[stream]", "[conditioning]\nanalysisRateHz = 300\n[stream]\nrateHz = 1000",
        "5: conditioning.analysisRateHz: it does not divide the stream's rate (1000 Hz); give 333.3333333333333 or 250, or another that does")]
    [InlineData(
        "[stream]", "[conditioning]\nanalysisRateHz = 1000\n[stream]\nrateHz = 1000",
        "5: conditioning.analysisRateHz: it is not below the stream's rate (1000 Hz); leave it out, or lower it")]
    [InlineData(
        "[stream]", "[conditioning]\nanalysisRateHz = 50\n[stream]",
        "16: band.highHz: it is above what is left whole at conditioning.analysisRateHz; give a number, at most 20 (Hz), or raise the analysis rate")]
    public void Is_refused_where_it_contradicts(string was, string becomes, string expected)
    {
        // One case moves a key out of its table to make room; what that breaks beside is not looked at.
        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.ShortBut(was, becomes), "s.toml"));

        Assert.Contains(refusal.Message.Split('\n'), line => line.StartsWith("s.toml:" + expected, StringComparison.Ordinal));
    }

    [Fact]
    public void A_reading_is_not_asked_for_more_often_than_rows_come()
    {
        var text = SheetTexts.ShortBut("[stream]", "[stream]\nrateHz = 100").Replace("\"planar\"\n\n", "\"planar\"\neveryMs = 9\n\n", StringComparison.Ordinal);

        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(text, "s.toml"));

        Assert.Equal("s.toml:18: band.wave.everyMs: it is shorter than one row; give a number, at least 10 (ms)", refusal.Message);
    }

    [Fact]
    public void A_reading_is_not_asked_for_more_often_than_rows_are_left()
    {
        var text = SheetTexts.ShortBut("[stream]", "[conditioning]\nanalysisRateHz = 100\n[stream]\nrateHz = 1000")
            .Replace("\"planar\"\n\n", "\"planar\"\neveryMs = 9\n\n", StringComparison.Ordinal);

        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(text, "s.toml"));

        Assert.Equal("s.toml:20: band.wave.everyMs: it is shorter than one row; give a number, at least 10 (ms)", refusal.Message);
    }

    [Fact]
    public void A_stream_of_few_channels_can_not_hold_a_patch_of_many()
    {
        var text = SheetTexts.ShortBut("[stream]", "[stream]\nchannels = 1").Replace("\"quill\"\nel", "\"quill\"\nchannels = [\"a\", \"b\"]\nel", StringComparison.Ordinal);

        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(text, "s.toml"));

        Assert.StartsWith("s.toml:10: patch.channels: it names 2 channels and the stream has 1; ", refusal.Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("60\nshort", "60\nshort", true)]
    [InlineData("pulsesPerMinute = 60", "pulsesPerMinute = 61", false)]
    [InlineData("shortestIntervalMs = 1000", "shortestIntervalMs = 1017", false)]
    [InlineData("shortestIntervalMs = 1000", "shortestIntervalMs = 1016", true)]
    public void Limits_that_can_never_act_are_a_slip(string was, string becomes, bool isFine)
    {
        var text = SheetTexts.ShortBut("[[rule]]", Limits.Replace(was, becomes, StringComparison.Ordinal));

        var refusal = Record.Exception(() => SheetReader.Parse(text, "s.toml"));

        if (isFine) Assert.Null(refusal);
        else Assert.StartsWith("s.toml:19: limits.pulsesPerMinute: ", Assert.IsType<RefusedException>(refusal).Message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("49.9", true)]
    [InlineData("50", false)]
    public void A_lead_is_shorter_than_the_oldest_data_allowed(string leadMs, bool isFine)
    {
        var text = SheetTexts.ShortBut("[[rule]]", Limits) + $"leadMs = {leadMs}\n";

        var refusal = Record.Exception(() => SheetReader.Parse(text, "s.toml"));

        if (isFine) Assert.Null(refusal);
        else Assert.StartsWith("s.toml:29: rule.leadMs: it is not below limits.oldestDataMs (50)", Assert.IsType<RefusedException>(refusal).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_name_that_was_refused_itself_does_not_make_a_second_fault()
    {
        var text = SheetTexts.ShortBut("name = \"quill\"", "name = \"a/b\"");

        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(text, "s.toml"));

        Assert.Equal("s.toml:8: patch.name", refusal.Where);
    }
}
