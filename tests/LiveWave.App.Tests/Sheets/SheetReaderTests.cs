using LiveWave.Abstractions;

namespace LiveWave.App.Tests;

/// <summary>Sheets from TOML: what they become, and where they say that something is wrong.</summary>
public sealed class SheetReaderTests
{
    [Fact]
    public void The_bundled_sheet_says_what_protocol_Millrace_says()
    {
        var sheet = SheetReader.Read(SheetTexts.MillracePath);

        Assert.Equal("millrace", sheet.Session.Name);
        Assert.Equal(("millrace.xdf", "Fenmarsh array", 1000, 60), (sheet.Stream.File, sheet.Stream.Name, sheet.Stream.RateHz, sheet.Stream.Channels));
        var patch = Assert.Single(sheet.Patches);
        Assert.Equal(("quill", "millrace_electrodes.tsv", "millrace.calibration.json"), (patch.Name, patch.Electrodes, patch.Calibration));
        Assert.Equal([new NamedAxis("anterior", 0), new NamedAxis("left", 90)], patch.Axes);
        var band = Assert.Single(sheet.Bands);
        Assert.Equal(("beta", 14, 22, "oscillator"), (band.Name, band.LowHz, band.HighHz, band.Phase.Estimator));
        Assert.Equal(("planar", 4, 60), (band.Waves[0].Estimator, band.Waves[0].EveryMs, band.Waves[0].Event.MinimumMs));
        var rule = Assert.Single(sheet.Rules);
        Assert.Equal(("toward-135", WaveKind.Planar, 135, 30, 20), (rule.Name, rule.Kind, rule.DirectionDegrees, rule.ToleranceDegrees, rule.StandardErrorDegrees));
        Assert.Equal((20, 1000, 0.2, 7), (rule.LeadMs, rule.RestMs, rule.ShamFraction, rule.Code));
        Assert.Equal(["stimulator"], rule.Outputs);
        Assert.Equal("none", Assert.Single(sheet.Outputs).Plugin);
        Assert.NotNull(sheet.Limits);
    }

    [Fact]
    public void A_table_may_be_written_in_line_with_dots_or_with_a_heading()
    {
        string[] ways =
        [
            "[[band.wave]]\nestimator = \"planar\"\n[band.wave.event]\nenter = 7.5\n[band.phase]\norder = 3\n",
            "phase.order = 3\n[[band.wave]]\nestimator = \"planar\"\nevent.enter = 7.5\n",
            "phase = { order = 3 }\nwave = [{ estimator = \"planar\", event = { enter = 7.5 } }]\n",
            "'phase' = { \"order\" = 0x3 }\nwave = [\n  {\n    estimator = 'planar',\n    event.enter = 75e-1\n  }\n]\n",
        ];

        Assert.All(ways, way =>
        {
            var sheet = SheetReader.Parse(SheetTexts.ShortBut("[[band.wave]]\nestimator = \"planar\"\n", way), "s.toml");

            Assert.Equal((3, 7.5), (sheet.Bands[0].Phase.Order, sheet.Bands[0].Waves[0].Event.Enter));
        });
    }

    [Fact]
    public void Sub_tables_belong_to_the_band_above_them()
    {
        var second = "[[band]]\nname = \"alpha\"\nlowHz = 8\nhighHz = 12\n[[band.wave]]\nestimator = \"planar\"\neveryMs = 8\n\n[[rule]]";

        var sheet = SheetReader.Parse(SheetTexts.ShortBut("[[rule]]", second), "s.toml");

        Assert.Equal([("beta", 4.0), ("alpha", 8.0)], sheet.Bands.Select(band => (band.Name, Assert.Single(band.Waves).EveryMs)));
    }

    [Theory]
    [InlineData("name = \"short\"", "nmae = \"short\"", "2: session.nmae: unknown key; did you mean 'name'?", "1: session.name: missing; give a name")]
    [InlineData("file = \"short.xdf\"", "", "4: stream.file: the stream has neither a file nor a query; give file")]
    [InlineData("file = \"short.xdf\"", "query = \"type='EEG'\"", "5: stream.query: not yet built")]
    [InlineData("lowHz = 14", "lowHz = \"14\"", "13: band.lowHz: it is a text; give a number above 0, at most 100000 (Hz)")]
    [InlineData("lowHz = 14", "lowHz = 1979-05-27", "13: band.lowHz: it is a date or time; give a number above 0")]
    [InlineData("highHz = 22\n", "", "11: band.highHz: missing; give a number above 0")]
    [InlineData("kind = \"planar\"", "kind = \"plane\"", "22: rule.kind: 'plane' is not known; did you mean 'planar'? give \"planar\"")]
    [InlineData("kind = \"planar\"", "kind = \"expanding\"", "22: rule.kind: 'expanding' is not yet built; give \"planar\"")]
    [InlineData("[[patch]]", "[patch]", "7: patch: it is a single table; there may be several: write it as [[patch]]")]
    [InlineData("[session]", "[[session]]", "1: session: it is a list of tables; there is one: write it as [session]")]
    [InlineData("[[rule]]", "[[cue]]\nname = \"a\"\n[[rule]]", "18: cue: not yet built")]
    [InlineData("[[rule]]", "[limit]\n[[rule]]", "18: limit: unknown table; did you mean 'limits'? allowed: [session], [stream], [amplifier], [[patch]]")]
    [InlineData("name = \"quill\"", "name = \"quill\"\naxes = { anterior = 0, left = \"90\" }", "9: patch.axes.left: it is a text; give a table of names with a number each")]
    [InlineData("[[rule]]", "[[output]]\nname = \"lamp\"\nplugin = \"none\"\n[output.options]\nline = [1]\n[[rule]]", "22: output.options.line: it is a list; give a table of numbers, texts, true or false")]
    [InlineData("[[rule]]", "[limits]\n[[rule]]", "18: limits.pulsesPerMinute: missing", "18: limits.pulsesPerSession: missing", "18: limits.shortestIntervalMs: missing", "18: limits.longestRunMinutes: missing", "18: limits.oldestDataMs: missing")]
    public void A_slip_is_named_with_file_line_key_and_what_is_allowed(string was, string becomes, params string[] expected)
    {
        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.ShortBut(was, becomes), "lab/short.toml"));

        var lines = refusal.Message.Split('\n');
        Assert.Equal(expected.Length, lines.Length);
        Assert.All(expected, start => Assert.Contains(lines, line => line.StartsWith("lab/short.toml:" + start, StringComparison.Ordinal)));
    }

    [Theory]
    [InlineData("name = \"short\"", "name = short", 2)]
    [InlineData("name = \"short\"", "name = \"short", 2)]
    [InlineData("[stream]", "[stream", 4)]
    [InlineData("[stream]", "[session]", 4)]
    [InlineData("lowHz = 14", "lowHz = 14\nlowHz = 15", 14)]
    [InlineData("lowHz = 14", "lowHz = 99999999999999999999", 13)]
    public void Broken_TOML_is_named_with_its_line(string was, string becomes, int line)
    {
        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.ShortBut(was, becomes), "lab/short.toml"));

        Assert.StartsWith($"lab/short.toml:{line}: not valid TOML: ", refusal.Message, StringComparison.Ordinal);
        Assert.All(refusal.Message.Split('\n'), text => Assert.StartsWith("lab/short.toml:", text, StringComparison.Ordinal));
    }

    [Fact]
    public void One_fault_keeps_its_parts_and_several_have_a_line_each()
    {
        var one = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.ShortBut("lowHz = 14", "lowHz = 0"), "s.toml"));
        var two = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.ShortBut("lowHz = 14", "lowHz = 0\nx = 1"), "s.toml"));

        Assert.Equal(("it is 0", "s.toml:13: band.lowHz"), (one.What, one.Where));
        Assert.Equal(2, two.Message.Split('\n').Length);
        Assert.StartsWith(one.Message + "\n", two.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_file_cut_off_within_an_escape_is_refused()
    {
        var refusal = Assert.Throws<RefusedException>(() => SheetReader.Parse(SheetTexts.Short + "wave = \"pla\\", "s.toml"));

        Assert.Equal("s.toml:23: not valid TOML: the file ends in the middle of a text", refusal.Message);
    }

    [Fact]
    public void Nesting_without_end_is_refused()
    {
        var text = SheetTexts.ShortBut("lowHz = 14", "lowHz = " + new string('[', 100_000));

        _ = Assert.Throws<RefusedException>(() => SheetReader.Parse(text, "s.toml"));
    }

    [Fact]
    public void A_patch_without_calibration_gets_the_one_beside_the_sheet()
    {
        var folder = Directory.CreateTempSubdirectory("livewave-sheet-");
        try
        {
            var path = Path.Combine(folder.FullName, "short.sheet.toml");
            File.WriteAllText(path, SheetTexts.Short);
            var without = SheetReader.Read(path);
            File.WriteAllText(Path.Combine(folder.FullName, "short.calibration.json"), "{}");
            var with = SheetReader.Read(path);

            Assert.Null(without.Patches[0].Calibration);
            Assert.Equal("short.calibration.json", with.Patches[0].Calibration);
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }

    [Fact]
    public void What_is_no_sheet_is_refused()
    {
        var folder = Directory.CreateTempSubdirectory("livewave-sheet-");
        try
        {
            var recording = Path.Combine(folder.FullName, "recording.xdf");
            File.WriteAllBytes(recording, new byte[1_000_001]);
            var binary = Path.Combine(folder.FullName, "binary.toml");
            File.WriteAllBytes(binary, [0x5B, 0xFF, 0xC0, 0x80]);
            string[] strange = [recording, binary, folder.FullName, Path.Combine(folder.FullName, "absent.toml"), "", "a\0b"];

            Assert.All(strange, path => Assert.Throws<RefusedException>(() => SheetReader.Read(path)));
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }
}
