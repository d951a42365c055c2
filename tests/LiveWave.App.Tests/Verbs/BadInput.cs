namespace LiveWave.App.Tests;

/// <summary>Whatever is wrong with what was handed in is said in one line with its place and what to do; exit code 2, no trace.</summary>
public sealed class BadInput
{
    private const string Header =
        "<?xml version=\"1.0\"?><info><name>Fenmarsh array</name><type>LFP</type><channel_count>CHANNELS</channel_count>"
        + "<nominal_srate>RATE</nominal_srate><channel_format>int16</channel_format></info>";

    [Fact]
    public void A_sheet_that_is_not_there()
    {
        var run = ProgramRun.Of("watch", "nowhere.sheet.toml");

        Refused(run, "nowhere.sheet.toml", "no such file");
    }

    [Fact]
    public void A_recording_that_is_not_there()
    {
        using var bench = new Bench();

        Refused(Watch(bench, "nowhere.xdf"), "nowhere.xdf");
    }

    [Fact]
    public void A_file_of_another_kind()
    {
        using var bench = new Bench();

        Refused(Watch(bench, bench.At("millrace_electrodes.tsv")), "millrace_electrodes.tsv", "XDF");
    }

    [Theory]
    [InlineData("0", "1000")]
    [InlineData("60", "-1000")]
    [InlineData("60", "0")]
    public void A_stream_without_channels_or_rate(string channels, string rate)
    {
        using var bench = new Bench();
        var recording = bench.WriteRecording(Header.Replace("CHANNELS", channels).Replace("RATE", rate), int.Parse(channels), rows: 10);

        Refused(Watch(bench, recording), "made.xdf");
    }

    [Fact]
    public void A_stream_with_another_number_of_channels_than_the_sheet_expects()
    {
        using var bench = new Bench();
        var recording = bench.WriteRecording(Header.Replace("CHANNELS", "4").Replace("RATE", "1000"), 4, rows: 10);

        Refused(Watch(bench, recording), "4 channels", "60");
    }

    [Fact]
    public void A_layout_that_names_other_channels_than_the_stream_has()
    {
        using var bench = new Bench();
        bench.Replace("millrace_electrodes.tsv", "r4c2\t", "r9c9\t");

        Refused(Watch(bench), "millrace_electrodes.tsv", "r9c9");
    }

    [Fact]
    public void A_calibration_of_another_layout()
    {
        using var bench = new Bench();
        bench.Replace("millrace_electrodes.tsv", "r4c2\t0.4\t1.2\t", "r4c2\t0.4\t1.3\t");

        Refused(Watch(bench), "millrace.calibration.json", "r4c2");
    }

    [Fact]
    public void A_calibration_for_another_conditioning()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "mainsHz = 0", "mainsHz = 50");

        Refused(Watch(bench), "millrace.calibration.json", "conditioning");
    }

    [Fact]
    public void A_calibration_for_another_analysis_rate()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "mainsHz = 0", "mainsHz = 0\nanalysisRateHz = 500");

        Refused(
            Watch(bench),
            "the conditioning is none in the calibration and 'decimator 500 Hz' in this run",
            "the distance of frames is 4 samples in the calibration and 2 samples in this run");
    }

    [Fact]
    public void An_analysis_rate_that_does_not_divide_the_recording_s()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "rateHz = 1000", "");
        bench.Replace("millrace.sheet.toml", "mainsHz = 0", "mainsHz = 0\nanalysisRateHz = 300");

        Refused(Watch(bench), "analysisRateHz is 300: it does not divide the stream's rate (1000 Hz)", "give 333.3333333333333 or 250");
    }

    [Fact]
    public void An_unknown_key_names_file_line_and_key()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "restMs = 1000", "restMilliseconds = 1000");

        Refused(Watch(bench), "millrace.sheet.toml:", "restMilliseconds", "restMs");
    }

    [Fact]
    public void A_table_that_is_not_built_yet_is_refused_as_such()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "[limits]", "[[cue]]\nname = \"x\"\n\n[limits]");

        Refused(Watch(bench), "not yet");
    }

    [Fact]
    public void A_bad_channel_that_does_not_exist()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "unit = \"mm\"", "unit = \"mm\"\nbadChannels = [\"r9c9\"]");

        Refused(Watch(bench), "r9c9", "bad channel");
    }

    [Fact]
    public void A_folder_in_place_of_a_sheet() => Refused(ProgramRun.Of("watch", Path.GetTempPath()), "folder");

    [Fact]
    public void A_band_beyond_what_the_rate_carries()
    {
        using var bench = new Bench();
        bench.Replace("millrace.sheet.toml", "highHz = 22", "highHz = 600");

        Refused(Watch(bench), "highHz", "500");
    }

    [Fact]
    public void A_session_folder_that_holds_something()
    {
        using var bench = new Bench();
        Directory.CreateDirectory(bench.At("out"));
        File.WriteAllText(bench.At("out/notes.txt"), "mine");

        Refused(ProgramRun.Of("demo", "--seconds", "1", "--out", bench.At("out")), "not empty");
        Assert.Equal(["notes.txt"], Directory.EnumerateFiles(bench.At("out")).Select(Path.GetFileName));
    }

    [Theory]
    [InlineData("--seconds", "-1")]
    [InlineData("--seconds", "soon")]
    [InlineData("--block-rows", "0")]
    [InlineData("--clock", "sundial")]
    [InlineData("--view", "window")]
    [InlineData("--frobnicate", "1")]
    [InlineData("--out", "")]
    [InlineData("--session-id", "../elsewhere")]
    public void An_option_that_makes_no_sense(string option, string value)
    {
        var run = ProgramRun.Of("demo", option, value);

        Assert.Equal(ExitCode.Refused, run.ExitCode);
        Assert.StartsWith("livewave: ", run.Error, StringComparison.Ordinal);
        Assert.Empty(run.Output);
    }

    [Fact]
    public void A_view_and_json_on_one_output()
    {
        var run = ProgramRun.Of("demo", "--json", "--view", "terminal");

        Assert.Equal(ExitCode.Refused, run.ExitCode);
        Assert.Contains("--json and --view terminal", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void A_recording_that_is_cut_off_is_judged_as_far_as_it_goes_and_the_session_says_so()
    {
        using var bench = new Bench();
        var bytes = File.ReadAllBytes(Bench.Recording);
        File.WriteAllBytes(bench.At("cut.xdf"), bytes[..(bytes.Length / 10)]);

        var run = ProgramRun.Of("watch", bench.Sheet, "--from", bench.At("cut.xdf"), "--out", bench.At("out"));

        Assert.Equal(ExitCode.Done, run.ExitCode);
        Assert.Contains("warning", run.Output, StringComparison.Ordinal);
        Assert.Contains("cut.xdf", File.ReadAllText(bench.At("out/run.log.jsonl")), StringComparison.Ordinal);
        Assert.True(File.ReadAllLines(bench.At("out/decisions.tsv")).Length > 2);
    }

    private static ProgramRun Watch(Bench bench, string? recording = null) =>
        ProgramRun.Of("watch", bench.Sheet, "--from", recording ?? Bench.Recording, "--out", bench.At("out"), "--seconds", "1");

    private static void Refused(ProgramRun run, params string[] says)
    {
        Assert.Equal(ExitCode.Refused, run.ExitCode);
        Assert.Single(run.Error.TrimEnd().Split('\n'));
        Assert.All(says, word => Assert.Contains(word, run.Error, StringComparison.Ordinal));
        Assert.DoesNotContain("   at ", run.Error, StringComparison.Ordinal);
        Assert.Empty(run.Output);
    }
}
