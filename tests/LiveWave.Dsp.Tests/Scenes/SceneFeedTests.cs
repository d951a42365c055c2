using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public sealed class SceneFeedTests
{
    private static readonly SceneBackground Usual = new() { LocalMicrovolts = 40, CommonMicrovolts = 24, ContactMicrovolts = 9, SensorMicrovolts = 1.5 };

    private static Scene Whole => Scenery.Silent(2, null, Scenery.Wave(WaveKind.Expanding) with { WavelengthMm = 3, OnsetSeconds = 0.5, DurationSeconds = 1 }) with
    {
        Wire = WireFormat.Int16,
        Background = Usual,
        Rhythm = new(18, 3.5, 9),
        HumMicrovolts = 5,
        Rig = new(0.2, 150, 7),
        Faults =
        [
            new() { Kind = SceneFaultKind.Movement, OnsetSeconds = 0.5, DurationSeconds = 1, Microvolts = 100 },
            new() { Kind = SceneFaultKind.Dying, Channels = ["r4c4"], OnsetSeconds = 0.5, DurationSeconds = 1, Microvolts = 20 },
        ],
    };

    [Fact]
    public void The_same_scene_gives_the_same_rows_whatever_the_blocks_are()
    {
        var (rows, stamps) = Scenery.Play(Whole, blockRows: 1);
        var (again, stampsAgain) = Scenery.Play(Whole, blockRows: 333);

        Assert.Equal(rows, again);
        Assert.Equal(stamps, stampsAgain);
    }

    [Fact]
    public void Another_seed_gives_other_rows_of_the_same_rig()
    {
        var scene = Scenery.Silent(0.1) with { Rig = new(0.2, 150, 7) };
        var noisy = scene with { Background = Usual };

        Assert.Equal(Scenery.Play(scene).Rows[0], Scenery.Play(scene with { Seed = 2 }).Rows[0]);
        Assert.NotEqual(Scenery.Play(noisy).Rows[0], Scenery.Play(noisy with { Seed = 2 }).Rows[0]);
        Assert.NotEqual(Scenery.Play(scene).Rows[0], Scenery.Play(scene with { Rig = new(0.2, 150, 8) }).Rows[0]);
    }

    /// <summary>A machine that computes other bits, or a change that moves recorded scenes, fails here.</summary>
    [Fact]
    public void Its_rows_are_the_ones_that_they_were()
    {
        var hash = 0xCBF29CE484222325;
        foreach (var value in Scenery.Play(Whole).Rows.SelectMany(row => row)) hash = (hash ^ (ulong)BitConverter.DoubleToInt64Bits(value)) * 0x100000001B3;

        Assert.Equal("4234fc0b6ad2cf5e", hash.ToString("x16", System.Globalization.CultureInfo.InvariantCulture));
    }

    [Fact]
    public void Values_are_whole_counts_within_the_converters_range()
    {
        var (rows, _) = Scenery.Play(Whole with { MicrovoltsPerCount = 0.01 });

        Assert.All(rows.SelectMany(row => row), value =>
        {
            Assert.Equal(value, Math.Round(value / 0.01) * 0.01);
            Assert.InRange(value, -327.68, 327.67);
        });
    }

    [Fact]
    public void A_gap_loses_rows_and_moves_stamps_and_nothing_else()
    {
        var whole = Scenery.Play(Whole);

        var (rows, stamps) = Scenery.Play(Whole with { Faults = [.. Whole.Faults, new() { Kind = SceneFaultKind.Gap, OnsetSeconds = 1, DurationSeconds = 0.25 }] });

        Assert.Equal(1750, rows.Length);
        Assert.Equal(whole.Stamps[999], stamps[999]);
        Assert.Equal(whole.Stamps[1250], stamps[1000]);
        Assert.Equal(whole.Rows[..1000], rows[..1000]);
        Assert.Equal(whole.Rows[1250..], rows[1000..]);
    }

    [Fact]
    public void A_scene_that_ends_in_a_gap_ends()
    {
        var (rows, _) = Scenery.Play(Scenery.Silent(1) with { Faults = [new() { Kind = SceneFaultKind.Gap, OnsetSeconds = 0.5 }] }, blockRows: 500);

        Assert.Equal(500, rows.Length);
    }

    [Fact]
    public void Swapped_channels_are_exchanged()
    {
        var whole = Scenery.Play(Whole).Rows;

        var swapped = Scenery.Play(Whole with { Faults = [.. Whole.Faults, new() { Kind = SceneFaultKind.Swapped, Channels = ["r1c2", "r1c3"] }] }).Rows;

        Assert.Equal(whole[700][0], swapped[700][1]);
        Assert.Equal(whole[700][1], swapped[700][0]);
        Assert.Equal(whole[700][2..], swapped[700][2..]);
    }

    [Fact]
    public void A_bad_channel_carries_noise_of_its_own_from_its_onset_on()
    {
        var fault = new SceneFault { Kind = SceneFaultKind.Bad, Channels = ["r1c2"], OnsetSeconds = 1, Microvolts = 30 };
        var whole = Scenery.Play(Whole).Rows;

        var rows = Scenery.Play(Whole with { Faults = [.. Whole.Faults, fault] }).Rows;

        Assert.Equal(whole[..1000], rows[..1000]);
        Assert.Equal(whole[1500][1..], rows[1500][1..]);
        var noise = rows[1000..].Select(row => row[0]).ToArray();
        Assert.Equal(0, noise.Average(), 4.0);
        Assert.Equal(30, Math.Sqrt(noise.Average(value => value * value)), 3.0);
    }

    [Fact]
    public void Saturation_holds_values_within_its_bound()
    {
        var rows = Scenery.Play(Whole with { Faults = [new() { Kind = SceneFaultKind.Saturation, OnsetSeconds = 1, DurationSeconds = 0.5, Microvolts = 60 }] }).Rows;

        Assert.All(rows[1000..1500].SelectMany(row => row), value => Assert.InRange(value, -60, 60));
        Assert.Contains(rows[1500..].SelectMany(row => row), value => Math.Abs(value) > 60);
    }

    [Fact]
    public void A_movement_is_as_large_as_asked_and_lasts_as_long()
    {
        var fault = new SceneFault { Kind = SceneFaultKind.Movement, OnsetSeconds = 1, DurationSeconds = 20, Microvolts = 300 };
        var rows = Scenery.Play(Scenery.Silent(22) with { Faults = [fault] }).Rows;

        Assert.All(rows[..1000].Concat(rows[21_000..]).SelectMany(row => row), value => Assert.Equal(0, value));

        // Over the whole bout its height is on average sqrt(3/8) of the largest.
        var rms = Math.Sqrt(rows[1000..21_000].SelectMany(row => row).Average(value => value * value));
        Assert.InRange(rms / (300 * Math.Sqrt(0.375)), 0.7, 1.4);
    }

    [Fact]
    public void A_pull_allocates_nothing()
    {
        using var feed = new SceneFeed(Whole);
        var block = new SampleBlock(feed.Format, 100);
        for (var i = 0; i < 8; i++) _ = feed.Pull(block, TimeSpan.Zero);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 8; i++) _ = feed.Pull(block, TimeSpan.Zero);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Fact]
    public void Events_that_overlap_add_up()
    {
        var (one, other) = (Scenery.Wave(WaveKind.Synchronous), Scenery.Wave(WaveKind.Expanding) with { WavelengthMm = 3, OnsetSeconds = 0.3, DurationSeconds = 0.2 });

        var both = Scenery.Play(Scenery.Silent(2, null, one, other, other with { OnsetSeconds = 1 })).Rows;

        var alone = Scenery.Play(Scenery.Silent(2, null, one)).Rows;
        Assert.Equal(alone[100], both[100]);
        Assert.Equal(alone[800], both[800]);
        Assert.NotEqual(alone[400], both[400]);
        Assert.NotEqual(alone[1100], both[1100]);
    }

    [Fact]
    public void Two_patches_lie_side_by_side_in_a_row_and_have_events_of_their_own()
    {
        var scene = Scenery.Silent(2, null, Scenery.Wave(WaveKind.Synchronous) with { Patch = "other" }) with
        {
            Patches = [Scenery.Grid, ScenePatch.Grid("other", 2, 3, 1, labelPrefix: "b-")],
        };

        var rows = Scenery.Play(scene).Rows;

        Assert.Equal(66, rows[0].Length);
        Assert.All(rows.SelectMany(row => row[..60]), value => Assert.Equal(0, value));
        Assert.Equal(100, rows.Max(row => row[62]), 0.5);
    }

    [Fact]
    public void What_can_not_be_made_is_refused()
    {
        var snr = Scenery.Wave(WaveKind.Synchronous) with { SnrDecibels = 6, AmplitudeMicrovolts = double.NaN };
        var stranger = new SceneFault { Kind = SceneFaultKind.Bad, Channels = ["r1c1"], Microvolts = 1 };

        Assert.Throws<RefusedException>(() => new SceneFeed(Scenery.Silent(2, null, snr)));
        Assert.Throws<RefusedException>(() => new SceneFeed(Scenery.Silent(2, null, snr with { SnrDecibels = double.NaN })));
        Assert.Throws<RefusedException>(() => new SceneFeed(Scenery.Silent(2, null, snr with { Patch = "none" })));
        Assert.Throws<RefusedException>(() => new SceneFeed(Scenery.Silent(2) with { Faults = [stranger] }));
    }
}
