using FsCheck;
using FsCheck.Xunit;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class CalibrationFileTests : IDisposable
{
    private const string Print = "entries/0/fingerprint/";
    private const string Model = "entries/0/phaseModel/";
    private const string Noise = "entries/0/noise/";
    private const string Threshold = "entries/0/thresholds/0/";

    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("livewave-calibration-");

    public void Dispose() => _folder.Delete(recursive: true);

    [Fact]
    public void Everything_in_the_file_arrives()
    {
        var file = Read(CalibrationDocument.Text);

        var entry = Assert.Single(file.Entries);
        var calibration = entry.Calibration;
        Assert.Equal(("a test", "{ \"seed\": 4102 }"), (file.MadeBy, file.Provenance));
        Assert.Equal(("quill", "beta", "microvolts", 74750), (calibration.Patch, calibration.Band, entry.Unit, entry.NoiseFrames));
        Assert.Equal([41.5, 58.1, 37.5], calibration.ChannelScale);
        Assert.Equal([5.1, 7.2, 4.3], calibration.ChannelRms);
        Assert.Equal((1000, 0.005), (calibration.PhaseModel!.RateHz, calibration.PhaseModel.WhiteVariance));
        Assert.Equal([new OscillatorTerm(0.98, 0.11, 0.001, true), new OscillatorTerm(0.9, 0.3, 0.002, false)], calibration.PhaseModel.Oscillators);
        Assert.Equal([new BackgroundTerm(0.99, 0.007)], calibration.PhaseModel.Background);
        Assert.Equal([1, 0.5, 0.25, 0.5, 1.1, 0.125, 0.25, 0.125, 0.9], calibration.Noise!.Covariance);
        Assert.Equal((0.01, "fitted", 0.02), (calibration.Noise.Loading, calibration.Noise.Form, calibration.Noise.Misfit));
        var threshold = calibration.ThresholdOf(WaveKind.Planar)!;
        Assert.Equal([-4, 5.5], threshold.EnterBySector);
        Assert.Equal(1, threshold.NominalPerMinute);
        Assert.Equal(new FalseEventRate(0.5, 0.28, 0.83, 15, 30), threshold.Surrogate);
        Assert.Equal(new FalseEventRate(0, 0, 0.75, 0, 4.9), threshold.Baseline);
    }

    [Fact]
    public void The_fingerprint_arrives()
    {
        var print = Read(CalibrationDocument.Text).Entries[0].Fingerprint;

        Assert.Equal(["r1c1", "r1c2", "r2c1"], print.Channels);
        Assert.Equal([(0, 0), (0.4, 0), (0, 0.4)], print.PositionsMm);
        Assert.Equal((1000, 14, 22, 4), (print.RateHz, print.LowHz, print.HighHz, print.SamplesPerFrame));
        Assert.Equal(["notch 50 Hz"], print.Conditioning);
        Assert.Equal(("oscillator", "planar"), (print.PhaseEstimator, print.WaveEstimator));
        Assert.Equal(new EventPrint(60, 61, 25, 20, 100), print.Event);
    }

    [Theory]
    [InlineData("madeBy")]
    [InlineData("provenance")]
    [InlineData("entries/0/noise")]
    [InlineData("entries/0/phaseModel")]
    [InlineData(Noise + "frames")]
    [InlineData(Threshold + "falseEventsPerMinute")]
    [InlineData(Threshold + "falseEventsPerMinute/nominal")]
    public void What_may_be_absent_may_be_absent_or_null(string path)
    {
        Assert.Single(Read(CalibrationDocument.With(path, "")).Entries);
        Assert.Single(Read(CalibrationDocument.With(path, "null")).Entries);
    }

    [Fact]
    public void What_is_not_known_is_not_a_number()
    {
        Assert.Equal(double.NaN, Read(CalibrationDocument.With(Noise + "misfit", "")).Entries[0].Calibration.Noise!.Misfit);
        var threshold = Read(CalibrationDocument.With(Threshold + "falseEventsPerMinute", "{}")).Entries[0].Calibration.Thresholds[0];
        Assert.Equal((double.NaN, null, null), (threshold.NominalPerMinute, threshold.Surrogate, threshold.Baseline));
    }

    [Fact]
    public void A_patch_with_bad_channels_has_a_scale_for_all_and_a_covariance_for_the_good_ones()
    {
        var text = CalibrationDocument.With("entries/0/channelScale", "[1, 2, 3, 4]").Replace("[5.1,7.2,4.3]", "[5, 6, 7, 8]", StringComparison.Ordinal)
            .Replace("\"unit\"", "\"channels\": [\"r1c1\", \"bad\", \"r1c2\", \"r2c1\"], \"unit\"", StringComparison.Ordinal);

        var entry = Read(text).Entries[0];

        Assert.Equal(["r1c1", "bad", "r1c2", "r2c1"], entry.PatchChannels);
        Assert.Equal([1, 2, 3, 4], entry.Calibration.ChannelScale);
        Assert.Equal(3, entry.Calibration.Noise!.ChannelCount);
    }

    [Theory]
    [InlineData("format", "\"other\"", "$.format: 'other' is another format; a calibration is 'livewave-calibration'")]
    [InlineData("format", "", "$: key 'format' is missing")]
    [InlineData("version", "2", "$.version: version 2 is not understood, only 1 is")]
    [InlineData("version", "\"1\"", "$.version: a text where a number is expected")]
    [InlineData("entries", "[]", "$.entries: the list is empty")]
    [InlineData("entries", "{}", "$.entries: an object where a list is expected")]
    [InlineData("entries/0", "7", "$.entries[0]: a number where an object is expected")]
    [InlineData("entries/0/noize", "{}", "$.entries[0]: key 'noize' is not known; known here are patch")]
    [InlineData("entries/0/patch", "\"\"", "$.entries[0].patch: the text is empty")]
    [InlineData("entries/0/patch", "", "$.entries[0]: key 'patch' is missing")]
    [InlineData("entries/0/channels", "[\"r1c2\", \"r1c1\", \"r2c1\"]", "good channel 'r1c2' is not among the patch's channels, in their order")]
    [InlineData("entries/0/channelScale", "", "$.entries[0]: key 'channelScale' is missing; the phase model is in its units")]
    [InlineData("entries/0/channelRms", "", "$.entries[0]: key 'channelRms' is missing; the noise is in its units")]
    [InlineData("entries/0/channelScale", "[1, 2]", "$.entries[0].channelScale: 2 values where 3 are expected")]
    [InlineData("entries/0/channelScale/1", "0", "$.entries[0].channelScale[1]: 0 is not above 0")]
    [InlineData("entries/0/channelRms/2", "-1", "$.entries[0].channelRms[2]: -1 is not above 0")]
    [InlineData("entries/0/channelRms/2", "1e999", "$.entries[0].channelRms[2]: 1e999 is not a finite number")]
    [InlineData("entries/0/channelRms/2", "true", "$.entries[0].channelRms[2]: true or false where a number is expected")]
    public void A_wrong_entry_is_refused_with_its_path(string path, string json, string said) => Refused(path, json, said);

    [Theory]
    [InlineData(Print + "channels", "[]", "$.entries[0].fingerprint.channels: there is no channel")]
    [InlineData(Print + "channels/1", "\"r1c1\"", "$.entries[0].fingerprint.channels[1]: channel 'r1c1' is there twice")]
    [InlineData(Print + "positionsMm", "[[0, 0]]", "$.entries[0].fingerprint.positionsMm: 1 positions where 3 are expected")]
    [InlineData(Print + "positionsMm/2", "[0]", "$.entries[0].fingerprint.positionsMm[2]: 1 numbers where 2 are expected")]
    [InlineData(Print + "rateHz", "0", "$.entries[0].fingerprint.rateHz: 0 is not above 0")]
    [InlineData(Print + "lowHz", "-14", "$.entries[0].fingerprint.lowHz: -14 is not above 0")]
    [InlineData(Print + "highHz", "14", "$.entries[0].fingerprint.highHz: the band's upper edge is not above the lower one")]
    [InlineData(Print + "highHz", "500", "$.entries[0].fingerprint.highHz: the band reaches half the rate")]
    [InlineData(Print + "samplesPerFrame", "0", "$.entries[0].fingerprint.samplesPerFrame: 0 is out of range; a whole number, at least 1")]
    [InlineData(Print + "samplesPerFrame", "2.5", "$.entries[0].fingerprint.samplesPerFrame: 2.5 is out of range")]
    [InlineData(Print + "conditioning", "[50]", "$.entries[0].fingerprint.conditioning[0]: a number where a text is expected")]
    [InlineData(Print + "event/gapMs", "-1", "$.entries[0].fingerprint.event.gapMs: -1 is out of range; at least 0")]
    [InlineData(Print + "event/stabilityDegrees", "181", "$.entries[0].fingerprint.event.stabilityDegrees: 181 is out of range; from 0 to 180")]
    [InlineData(Print + "event/gapMs", "", "$.entries[0].fingerprint.event: key 'gapMs' is missing")]
    public void A_wrong_fingerprint_is_refused_with_its_path(string path, string json, string said) => Refused(path, json, said);

    [Theory]
    [InlineData(Model + "oscillators", "[]", "$.entries[0].phaseModel.oscillators: none of the oscillators is the target")]
    [InlineData(Model + "oscillators/0/poleRe", "0.994", "$.entries[0].phaseModel.oscillators[0]: the pole is not inside the unit circle")]
    [InlineData(Model + "oscillators/0/isTarget", "1", "$.entries[0].phaseModel.oscillators[0].isTarget: a number where true or false is expected")]
    [InlineData(Model + "background/0/pole", "1", "$.entries[0].phaseModel.background[0].pole: the pole is not below 1")]
    [InlineData(Model + "background/0/driveVariance", "-0.1", "$.entries[0].phaseModel.background[0].driveVariance: -0.1 is out of range")]
    [InlineData(Model + "whiteVariance", "0", "$.entries[0].phaseModel.whiteVariance: 0 is not above 0")]
    [InlineData(Noise + "covariance", "[[1]]", "$.entries[0].noise.covariance: 1 rows where 3 are expected")]
    [InlineData(Noise + "covariance/1", "[1, 2]", "$.entries[0].noise.covariance[1]: 2 values where 3 are expected")]
    [InlineData(Noise + "covariance/2/0", "0.2500001", "$.entries[0].noise.covariance[2][0]: the covariance is not symmetric: 0.2500001 here, 0.25 across")]
    [InlineData(Noise + "covariance/1/1", "0", "$.entries[0].noise.covariance[1][1]: 0 is not above 0")]
    [InlineData(Noise + "loading", "-1", "$.entries[0].noise.loading: -1 is out of range")]
    [InlineData(Threshold + "kind", "\"plane\"", "$.entries[0].thresholds[0].kind: 'plane' is no kind of wave; kinds are planar, rotating-counter-clockwise")]
    [InlineData(Threshold + "sectors", "8", "$.entries[0].thresholds[0].enter: 2 thresholds where 8 are expected")]
    [InlineData(Threshold + "enter/1", "null", "$.entries[0].thresholds[0].enter[1]: null where a number is expected")]
    [InlineData(Threshold + "falseEventsPerMinute/surrogateHigh", "0.4", "falseEventsPerMinute.surrogate: the rate lies outside of its own interval")]
    [InlineData(Threshold + "falseEventsPerMinute/baselineLow", "", "falseEventsPerMinute: key 'baselineLow' is missing")]
    [InlineData(Threshold + "falseEventsPerMinute/baselineMinutes", "0", "falseEventsPerMinute.baselineMinutes: 0 is not above 0")]
    [InlineData(Threshold + "falseEventsPerMinute/surrogateCount", "-1", "falseEventsPerMinute.surrogateCount: -1 is out of range")]
    public void What_cannot_have_been_learnt_is_refused_with_its_path(string path, string json, string said) => Refused(path, json, said);

    [Fact]
    public void A_patch_and_band_that_are_there_twice_are_refused()
    {
        var entries = CalibrationDocument.Text[CalibrationDocument.Text.IndexOf("[ {", StringComparison.Ordinal)..];
        var entry = entries[2..entries.LastIndexOf(']')];
        var text = CalibrationDocument.With("entries", $"[{entry}, {entry}]");

        Assert.Contains("$.entries[1]: this patch and band are there twice", Refusal(text).Message);
    }

    [Fact]
    public void Broken_JSON_is_refused_with_line_and_byte()
    {
        var said = Refusal("{\n  \"format\": oops\n}").Message;

        Assert.Contains("calibration.json, line 2, byte 13: this is not sound JSON", said);
        Assert.DoesNotContain("LineNumber", said);
        Assert.DoesNotContain('\n', said);
    }

    [Theory]
    [InlineData("{ \"format\": \"livewave-calibration\", \"version\": 1, \"version\": 1 }", "Duplicate")]
    [InlineData("[]", "a list where an object is expected")]
    [InlineData("", "not sound JSON")]
    [InlineData("{ \"format\": \"\\uD800\" }", "not Unicode")]
    [InlineData("{ \"format\": NaN }", "not sound JSON")]
    public void What_is_no_calibration_at_all_is_refused(string text, string said)
    {
        Assert.Contains(said, Refusal(text).Message);
    }

    [Fact]
    public void A_missing_file_is_refused()
    {
        var said = Assert.Throws<RefusedException>(() => CalibrationFile.Read(Path.Combine(_folder.FullName, "absent.json"))).Message;

        Assert.Contains("absent.json: no such calibration", said);
    }

    [Fact]
    public void A_file_cut_anywhere_is_refused_and_nothing_else()
    {
        for (var length = 0; length < CalibrationDocument.Text.Length - 1; length += 7) Refusal(CalibrationDocument.Text[..length]);
    }

    [Property(Replay = "2026,1201", MaxTest = 300)]
    public void A_changed_letter_is_read_or_refused_and_nothing_else(NonNegativeInt place, byte letter)
    {
        var bytes = System.Text.Encoding.UTF8.GetBytes(CalibrationDocument.Text);
        bytes[place.Get * 7919 % bytes.Length] = letter;
        var path = Path.Combine(_folder.FullName, "changed.json");
        File.WriteAllBytes(path, bytes);

        try
        {
            Assert.Single(CalibrationFile.Read(path).Entries);
        }
        catch (RefusedException refusal)
        {
            Assert.StartsWith(path, refusal.Message);
            Assert.DoesNotContain(refusal.Message, char.IsControl);
        }
    }

    private void Refused(string path, string json, string said)
    {
        var refusal = Refusal(CalibrationDocument.With(path, json));

        Assert.Contains(said, refusal.Message);
        Assert.NotEqual("", refusal.Advice);
    }

    private RefusedException Refusal(string text) => Assert.Throws<RefusedException>(() => Read(text));

    private CalibrationFile Read(string text)
    {
        var path = Path.Combine(_folder.FullName, "calibration.json");
        File.WriteAllText(path, text);
        return CalibrationFile.Read(path);
    }
}
