using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public class EventMachineTests
{
    private static readonly JsonElement Golden = JsonDocument
        .Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "events.json"))).RootElement;

    public static IEnumerable<TheoryDataRow<string>> Cases() =>
        Golden.GetProperty("cases").EnumerateArray().Select(entry => new TheoryDataRow<string>(entry.GetProperty("id").GetString()!));

    // Golden/events.json: the reference programme of our wave study, section 7, cut by tools/golden/wave_vectors.py.
    [Theory]
    [MemberData(nameof(Cases))]
    public void Events_start_pass_end_and_point_as_in_the_study(string id)
    {
        var golden = Golden.GetProperty("cases").EnumerateArray().Single(entry => entry.GetProperty("id").GetString() == id);
        var statistics = golden.GetProperty("s").EnumerateArray().Select(value => value.GetDouble()).ToArray();
        var directions = golden.GetProperty("theta_deg").EnumerateArray().Select(value => value.GetDouble()).ToArray();

        var events = Run(Rule(golden), statistics.Select((s, i) => ((long)i, Reading(s, directions[i], i))));

        var expected = golden.GetProperty("expected").EnumerateArray().ToArray();
        Assert.Equal(expected.Length, events.Count);
        foreach (var (wanted, found) in expected.Zip(events))
        {
            Assert.Equal(wanted.GetProperty("start").GetInt64(), found.OnsetFrame);
            Assert.Equal(wanted.GetProperty("trigger").GetInt64(), found.PassedFrame);
            Assert.Equal(wanted.GetProperty("end").GetInt64(), found.LastFrame);
            Assert.Equal(0, Math.IEEERemainder(wanted.GetProperty("direction_deg").GetDouble() - found.DirectionDegrees, 360), 1e-6);
        }
    }

    [Theory]
    [MemberData(nameof(Cases))]
    public void Frames_left_out_count_as_frames_without_evidence(string id)
    {
        var golden = Golden.GetProperty("cases").EnumerateArray().Single(entry => entry.GetProperty("id").GetString() == id);
        var frames = golden.GetProperty("s").EnumerateArray().Zip(golden.GetProperty("theta_deg").EnumerateArray())
            .Select((pair, i) => ((long)i, Reading(pair.First.GetDouble(), pair.Second.GetDouble(), i))).ToArray();
        static bool IsLost(long frame) => frame * 7919 % 31 < 4 || frame % 200 is > 30 and < 45;

        var leftOut = Run(Rule(golden), frames.Where(frame => !IsLost(frame.Item1)));
        var empty = Run(Rule(golden), frames.Select(frame => IsLost(frame.Item1) ? (frame.Item1, new Reading()) : frame));

        Assert.Equal(empty, leftOut);
    }

    [Fact]
    public void An_event_forms_passes_and_ends_one_frame_more_than_the_gap_after_its_last()
    {
        var machine = new EventMachine(Plain());

        Assert.Equal(EventTransition.Formed, machine.Step(0, Reading(6, 40, 0)));
        Assert.Equal(WaveEventState.Forming, machine.State);
        for (var frame = 1; frame < 14; frame++) Assert.Equal(EventTransition.Nothing, machine.Step(frame, Reading(6 + frame, 40, frame)));
        Assert.Equal(EventTransition.Passed, machine.Step(14, Reading(4.5, 40, 14)));
        Assert.Equal(WaveEventState.Passing, machine.State);
        for (var frame = 15; frame < 20; frame++) Assert.Equal(EventTransition.Nothing, machine.Step(frame, Reading(0, 40, frame)));
        Assert.Equal(EventTransition.Ended, machine.Step(20, Reading(0, 40, 20)));

        Assert.Equal(WaveEventState.Quiet, machine.State);
        Assert.Equal(0, machine.Over.OnsetFrame);
        Assert.Equal(14, machine.Over.PassedFrame);
        Assert.Equal(14, machine.Over.LastFrame);
        Assert.Equal(4 * 14, machine.Over.Last.Index);
        Assert.Equal(15, machine.Over.Frames);
        Assert.Equal(19, machine.Over.PeakEvidence);
        Assert.Equal(40, machine.Over.DirectionDegrees, 1e-9);
    }

    [Fact]
    public void What_does_not_pass_fades_and_the_next_may_form_at_once()
    {
        var machine = new EventMachine(Plain());
        for (var frame = 0; frame < 5; frame++) _ = machine.Step(frame, Reading(6, 40, frame));
        for (var frame = 5; frame < 10; frame++) _ = machine.Step(frame, Reading(0, 40, frame));

        Assert.Equal(EventTransition.Faded, machine.Step(10, Reading(0, 40, 10)));
        Assert.Equal(-1, machine.Over.PassedFrame);
        Assert.Equal(EventTransition.Formed, machine.Step(11, Reading(6, 40, 11)));
    }

    [Fact]
    public void A_jump_ends_an_event_and_the_frame_after_it_may_form_the_next()
    {
        var machine = new EventMachine(Plain());
        for (var frame = 0; frame < 20; frame++) _ = machine.Step(frame, Reading(6, 40, frame));

        var happened = machine.Step(100, Reading(6, 200, 100));

        Assert.Equal(EventTransition.Ended | EventTransition.Formed, happened);
        Assert.Equal(19, machine.Over.LastFrame);
        Assert.Equal(100, machine.Current.OnsetFrame);
        Assert.Equal(200, machine.ResultantDegrees, 1e-9);
    }

    [Fact]
    public void A_jump_within_the_gap_is_bridged()
    {
        var machine = new EventMachine(Plain());
        for (var frame = 0; frame < 20; frame++) _ = machine.Step(frame, Reading(6, 40, frame));

        Assert.Equal(EventTransition.Nothing, machine.Step(25, Reading(6, 40, 25)));
        Assert.Equal(EventTransition.Ended, machine.Step(32, Reading(0, 40, 32)));
    }

    [Fact]
    public void Where_one_frame_is_enough_an_event_forms_and_passes_in_it()
    {
        var machine = new EventMachine(new EventRule([5], 250) { MinimumMs = 0 });

        Assert.Equal(EventTransition.Formed | EventTransition.Passed, machine.Step(7, Reading(6, 40, 7)));
    }

    [Fact]
    public void While_it_passes_the_resultant_follows_the_direction_and_the_events_own_stays()
    {
        var machine = new EventMachine(Plain());
        for (var frame = 0; frame < 60; frame++) _ = machine.Step(frame, Reading(6, frame < 30 ? 40 : 130, frame));

        Assert.Equal(40, machine.Current.DirectionDegrees, 1e-9);
        Assert.Equal(130, machine.ResultantDegrees, 1e-9);
        Assert.Equal(1, machine.ResultantLength, 1e-12);
    }

    [Fact]
    public void Weak_frames_without_direction_do_not_count_against_steadiness()
    {
        var machine = new EventMachine(Plain());
        var happened = EventTransition.Nothing;
        for (var frame = 0; frame < 15; frame++)
        {
            happened = machine.Step(frame, frame is > 4 and < 9 ? Reading(1, double.NaN, frame) : Reading(6, 40, frame));
        }

        Assert.Equal(EventTransition.Passed, happened);
    }

    [Fact]
    public void With_directions_in_less_than_half_of_the_window_nothing_passes()
    {
        var machine = new EventMachine(Plain());

        for (var frame = 0; frame < 60; frame++)
        {
            var happened = machine.Step(frame, frame % 3 == 0 ? Reading(6, 40, frame) : Reading(1, double.NaN, frame));
            Assert.Equal(EventTransition.Nothing, happened & EventTransition.Passed);
        }
    }

    [Fact]
    public void Where_steadiness_is_not_asked_frames_need_no_direction()
    {
        var machine = new EventMachine(new EventRule([5], 250) { StabilityDegrees = 180 });
        var happened = EventTransition.Nothing;
        for (var frame = 0; frame < 15; frame++) happened = machine.Step(frame, Reading(6, double.NaN, frame));

        Assert.Equal(EventTransition.Passed, happened);
        Assert.Equal(double.NaN, machine.Current.DirectionDegrees);
    }

    [Fact]
    public void An_event_has_the_kind_of_its_strongest_frame()
    {
        var machine = new EventMachine(Plain());
        _ = machine.Step(0, Reading(6, 40, 0));
        _ = machine.Step(1, Reading(9, 40, 1) with { Kind = WaveKind.Expanding });
        _ = machine.Step(2, Reading(4.5, 40, 2) with { Kind = WaveKind.None });

        Assert.Equal(WaveKind.Expanding, machine.Current.Kind);
    }

    [Fact]
    public void Thresholds_hold_in_sectors_centred_on_their_directions()
    {
        var rule = new EventRule([5, 5, 5, 5, 5, 9, 5, 5], 250);

        Assert.Equal(EventTransition.Formed, new EventMachine(rule).Step(0, Reading(6, 202.4, 0)));
        Assert.Equal(EventTransition.Nothing, new EventMachine(rule).Step(0, Reading(6, 202.6, 0)));
        Assert.Equal(EventTransition.Nothing, new EventMachine(rule).Step(0, Reading(6, 247.4, 0)));
        Assert.Equal(EventTransition.Formed, new EventMachine(rule).Step(0, Reading(6, 247.6, 0)));
        Assert.Equal(EventTransition.Formed, new EventMachine(rule).Step(0, Reading(6, 359.9, 0)));
        Assert.Equal(EventTransition.Nothing, new EventMachine(rule).Step(0, Reading(6, double.NaN, 0)));
    }

    [Fact]
    public void Closing_ends_what_goes_on_and_the_next_still_waits_for_its_rest()
    {
        var machine = new EventMachine(Plain());
        Assert.Equal(EventTransition.Nothing, machine.Close());
        for (var frame = 0; frame < 20; frame++) _ = machine.Step(frame, Reading(6, 40, frame));

        Assert.Equal(EventTransition.Ended, machine.Close());
        Assert.Equal(EventTransition.Nothing, machine.Step(44, Reading(6, 40, 44)));
        Assert.Equal(EventTransition.Formed, machine.Step(45, Reading(6, 40, 45)));
        Assert.Equal(EventTransition.Faded, machine.Close());
    }

    [Fact]
    public void Reset_equals_new()
    {
        var machine = new EventMachine(Plain());
        for (var frame = 0; frame < 20; frame++) _ = machine.Step(frame, Reading(6, 40, frame));

        machine.Reset();

        Assert.Equal(WaveEventState.Quiet, machine.State);
        Assert.Equal(EventTransition.Formed, machine.Step(3, Reading(6, 70, 3)));
        Assert.Equal(70, machine.ResultantDegrees, 1e-9);
    }

    [Fact]
    public void Stepping_allocates_nothing()
    {
        var machine = new EventMachine(Plain());
        var reading = Reading(6, 40, 0);
        var nothing = new Reading();
        for (var frame = 0; frame < 100; frame++) _ = machine.Step(frame, frame % 50 < 30 ? reading : nothing);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var frame = 100; frame < 1000; frame++) _ = machine.Step(frame * 2, frame % 50 < 30 ? reading : nothing);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Fact]
    public void Rules_without_a_threshold_or_a_rate_are_refused()
    {
        Assert.Throws<RefusedException>(() => new EventRule([], 250));
        Assert.Throws<RefusedException>(() => new EventRule([5, double.NaN], 250));
        Assert.Throws<RefusedException>(() => new EventRule([5], 0));
    }

    private static EventRule Plain() => new([5], 250);

    private static EventRule Rule(JsonElement golden)
    {
        var parameters = golden.GetProperty("params");
        var enter = parameters.GetProperty("enter");
        var sectors = enter.ValueKind == JsonValueKind.Array ? enter.EnumerateArray().Select(v => v.GetDouble()).ToArray() : [enter.GetDouble()];
        return new EventRule(sectors, golden.GetProperty("frame_rate_hz").GetDouble())
        {
            MinimumMs = parameters.GetProperty("min_ms").GetDouble(),
            GapMs = parameters.GetProperty("gap_ms").GetDouble(),
            StabilityMs = parameters.GetProperty("stab_ms").GetDouble(),
            StabilityDegrees = parameters.GetProperty("sd_max").GetDouble(),
            RefractoryMs = parameters.GetProperty("refr_ms").GetDouble(),
        };
    }

    private static Reading Reading(double statistic, double degrees, long frame) => new()
    {
        At = new RowInstant(4 * frame, 4 * frame, frame / 250.0),
        IsValid = true,
        Kind = WaveKind.Planar,
        Statistic = statistic,
        DirectionDegrees = degrees - 360 * Math.Floor(degrees / 360),
        DirectionCosine = double.IsNaN(degrees) ? double.NaN : Math.Cos(degrees * Math.PI / 180),
        DirectionSine = double.IsNaN(degrees) ? double.NaN : Math.Sin(degrees * Math.PI / 180),
    };

    private static List<EventTrace> Run(EventRule rule, IEnumerable<(long Frame, Reading Reading)> frames)
    {
        var machine = new EventMachine(rule);
        var passed = new List<EventTrace>();
        foreach (var (frame, reading) in frames)
        {
            if ((machine.Step(frame, reading) & EventTransition.Ended) != 0) passed.Add(machine.Over);
        }

        if (machine.Close() == EventTransition.Ended) passed.Add(machine.Over);
        return passed;
    }
}
