using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class CalibrationFingerprintTests
{
    private static readonly CalibrationFingerprint Made = new()
    {
        Channels = ["r1c1", "r1c2", "r2c1"],
        PositionsMm = [(0, 0), (0.4, 0), (0, 0.4)],
        RateHz = 1000,
        LowHz = 14,
        HighHz = 22,
        Conditioning = [],
        PhaseEstimator = "oscillator",
        WaveEstimator = "planar",
        SamplesPerFrame = 4,
        Event = new EventPrint(60, 60, 25, 20, 100),
    };

    public static TheoryData<CalibrationFingerprint, string> Changes => new()
    {
        { Made with { Channels = ["r1c1", "r9c9", "r2c1"] }, "good channel 2 is 'r1c2' in the calibration and 'r9c9' in this run" },
        { Made with { Channels = ["r1c2", "r1c1", "r2c1"] }, "good channel 1 is 'r1c1' in the calibration and 'r1c2' in this run, and 1 more differ" },
        { Made with { PositionsMm = [(0, 0), (0.4, 0), (0, 0.5)] }, "the position of 'r2c1' is (0, 0.4) mm in the calibration and (0, 0.5) mm in this run" },
        { Made with { PositionsMm = [(0, 0), (0.4, 2e-6), (0, 0.4)] }, "the position of 'r1c2' is (0.4, 0) mm in the calibration and (0.4, 2E-06) mm in this run" },
        { Made with { RateHz = 500 }, "the rate is 1000 Hz in the calibration and 500 Hz in this run" },
        { Made with { LowHz = 13.5 }, "the band's lower edge is 14 Hz in the calibration and 13.5 Hz in this run" },
        { Made with { HighHz = 30 }, "the band's upper edge is 22 Hz in the calibration and 30 Hz in this run" },
        { Made with { Conditioning = ["notch 50 Hz", "median"] }, "the conditioning is none in the calibration and 'notch 50 Hz, then median' in this run" },
        { Made with { PhaseEstimator = "spectrum-fir" }, "the phase estimator is 'oscillator' in the calibration and 'spectrum-fir' in this run" },
        { Made with { WaveEstimator = "rotating" }, "the wave estimator is 'planar' in the calibration and 'rotating' in this run" },
        { Made with { SamplesPerFrame = 5 }, "the distance of frames is 4 samples in the calibration and 5 samples in this run" },
        { Made with { Event = Made.Event with { MinimumMs = 50 } }, "the event's shortest duration is 60 ms in the calibration and 50 ms in this run" },
        { Made with { Event = Made.Event with { StabilityMs = 50 } }, "the event's stability time is 60 ms in the calibration and 50 ms in this run" },
        { Made with { Event = Made.Event with { StabilityDegrees = 30 } }, "the event's stability is 25 degrees in the calibration and 30 degrees in this run" },
        { Made with { Event = Made.Event with { GapMs = 0 } }, "the event's longest gap is 20 ms in the calibration and 0 ms in this run" },
        { Made with { Event = Made.Event with { RefractoryMs = 0 } }, "the event's refractory time is 100 ms in the calibration and 0 ms in this run" },
    };

    [Theory]
    [MemberData(nameof(Changes), DisableDiscoveryEnumeration = true)]
    public void A_field_that_differs_is_named_with_both_values(CalibrationFingerprint run, string said)
    {
        Assert.Equal([said], Made.Differences(run));
    }

    [Fact]
    public void Equal_values_in_other_lists_fit_and_places_may_differ_by_rounding()
    {
        var run = Made with { Channels = [.. Made.Channels], PositionsMm = [(1e-7, 0), (0.4, -9e-7), (0, 0.4)], Conditioning = [] };

        Assert.Empty(Made.Differences(run));
    }

    [Fact]
    public void Another_number_of_channels_is_said_and_what_is_behind_it_too()
    {
        var run = Made with { Channels = ["r1c1", "r2c1"], PositionsMm = [(0, 0), (0, 0.4)], RateHz = 500 };

        Assert.Equal(
            [
                "the number of good channels is 3 in the calibration and 2 in this run",
                "good channel 2 is 'r1c2' in the calibration and 'r2c1' in this run",
                "the rate is 1000 Hz in the calibration and 500 Hz in this run",
            ],
            Made.Differences(run));
    }

    [Fact]
    public void A_run_gets_the_entry_that_was_made_for_it_and_only_that()
    {
        var path = Path.GetTempFileName();
        try
        {
            File.WriteAllText(path, CalibrationDocument.Text);
            var file = CalibrationFile.Read(path);
            var made = file.Entries[0].Fingerprint;

            Assert.Same(file.Entries[0], file.Fitting("quill", "beta", made with { Channels = [.. made.Channels] }));
            var other = Assert.Throws<RefusedException>(() => file.Fitting("quill", "beta", made with { RateHz = 500, LowHz = 12 }));
            Assert.Contains("made for something else: the rate is 1000 Hz in the calibration and 500 Hz in this run; the band's lower", other.Message);
            var absent = Assert.Throws<RefusedException>(() => file.Fitting("quill", "theta", made));
            Assert.Contains("patch 'quill', band 'theta': the calibration holds nothing for it; it holds 'quill' in 'beta'", absent.Message);
            Assert.Null(file.Find("quill", "theta"));
        }
        finally
        {
            File.Delete(path);
        }
    }
}
