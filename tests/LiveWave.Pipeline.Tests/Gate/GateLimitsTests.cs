using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class GateLimitsTests
{
    [Fact]
    public void No_more_pulses_leave_in_a_minute_than_allowed()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerMinute = 2 }).Armed();

        Assert.Equal(OutcomeKind.Sent, bench.Round(110));
        Assert.Equal(OutcomeKind.Sent, bench.Round(120));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(169.9));
        Assert.Equal(OutcomeKind.Sent, bench.Round(170));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(179.9));
        Assert.Equal(OutcomeKind.Sent, bench.Round(180));
        Assert.Equal(GateState.Armed, bench.Gate.State);
    }

    [Fact]
    public void The_shortest_interval_holds()
    {
        using var bench = new GateBench(new GateLimits { ShortestIntervalMs = 300 }).Armed();

        Assert.Equal(OutcomeKind.Sent, bench.Round(101.1));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(101.399));
        Assert.Equal(OutcomeKind.Sent, bench.Round(101.4));   // 101.4 - 101.1 is 0.30000000000001137 or 0.2999…: the same interval
        Assert.Equal(OutcomeKind.Sent, bench.Round(101.7));
    }

    [Fact]
    public void An_interval_that_was_long_enough_in_stamps_must_be_so_on_the_clock_too()
    {
        using var bench = new GateBench(new GateLimits { ShortestIntervalMs = 300 }).Armed();
        _ = bench.Commit(101);
        bench.StepAt(101.0009);   // late, as far as allowed
        Assert.Equal(OutcomeKind.Sent, bench.Take().Kind);

        Assert.Equal(OutcomeKind.OverLimit, bench.Round(101.3));
    }

    [Fact]
    public void An_interval_that_was_long_enough_on_the_clock_must_be_so_in_stamps_too()
    {
        using var bench = new GateBench(new GateLimits { ShortestIntervalMs = 300 }).Armed();
        Assert.Equal(OutcomeKind.Sent, bench.Round(101));
        _ = bench.Commit(101.2995);

        bench.StepAt(101.3002);

        Assert.Equal(OutcomeKind.OverLimit, bench.Take().Kind);
    }

    [Fact]
    public void The_session_s_last_pulse_is_the_last_and_the_next_one_disarms()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerSession = 2 }).Armed();

        Assert.Equal(OutcomeKind.Sent, bench.Round(101));
        Assert.Equal(OutcomeKind.Sent, bench.Round(102));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(103));
        Assert.Equal(GateState.Disarmed, bench.Gate.State);
        Assert.Equal("a limit of the session is reached", bench.Gate.DisarmReason);
        bench.Gate.Arm();
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(104));
        Assert.Equal(2, bench.A.SentCount);
    }

    [Fact]
    public void The_longest_run_is_counted_from_its_beginning()
    {
        using var bench = new GateBench(new GateLimits { LongestRunMinutes = 1 }).Armed();   // made at 100

        Assert.Equal(OutcomeKind.Sent, bench.Round(159.9));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(160.1));
        Assert.Equal(GateState.Disarmed, bench.Gate.State);
    }

    [Theory]
    [InlineData(100.0, 50, OutcomeKind.Sent)]
    [InlineData(99.94, 50, OutcomeKind.OverLimit)]
    [InlineData(double.NaN, 50, OutcomeKind.OverLimit)]
    [InlineData(double.NaN, null, OutcomeKind.Sent)]
    public void Old_data_send_nothing(double acquiredSeconds, int? oldestMs, OutcomeKind expected)
    {
        using var bench = new GateBench(new GateLimits { OldestDataMs = oldestMs }).Armed();
        var decision = bench.Decide(100.02);
        var stages = GateBench.Stages(acquiredSeconds);
        bench.Gate.Commit(in decision, in stages, 0);

        bench.StepAt(100.02);

        Assert.Equal(expected, bench.Take().Kind);
    }

    [Fact]
    public void A_pulse_to_two_outputs_counts_once_and_reaches_both()
    {
        using var bench = new GateBench(new GateLimits { ShortestIntervalMs = 300, PulsesPerSession = 1 }).Armed();
        var decision = bench.Decide(100.02);
        var stages = GateBench.Stages(100);
        bench.Gate.Commit(in decision, in stages, [0, 1]);

        bench.StepAt(100.02, output: 0);
        bench.StepAt(100.02, output: 1);

        Assert.Equal((OutcomeKind.Sent, OutcomeKind.Sent), (bench.Take().Kind, bench.Take().Kind));
        Assert.Equal((1, 1, 1), (bench.Gate.PulsesUsed, bench.A.SentCount, bench.B.SentCount));
    }

    [Fact]
    public void Shams_and_pulses_that_were_not_sent_use_up_nothing()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerSession = 1, ShortestIntervalMs = 1000 }).Armed();
        Assert.Equal(OutcomeKind.Withheld, bench.Round(100.1, DecisionKind.Sham));
        _ = bench.Commit(100.2);
        bench.StepAt(100.3);
        Assert.Equal(OutcomeKind.Late, bench.Take().Kind);

        Assert.Equal(OutcomeKind.Sent, bench.Round(100.4));
    }

    [Fact]
    public void A_sham_meets_the_limits_that_a_pulse_would_meet()
    {
        using var bench = new GateBench(new GateLimits { ShortestIntervalMs = 1000 }).Armed();
        Assert.Equal(OutcomeKind.Sent, bench.Round(101));

        Assert.Equal(OutcomeKind.OverLimit, bench.Round(101.5, DecisionKind.Sham));
    }

    [Fact]
    public void A_pulse_on_which_the_output_failed_counts()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerSession = 5 }).Armed();
        bench.A.Throws = _ => true;

        Assert.Equal(OutcomeKind.RefusedByOutput, bench.Round(101));

        Assert.Equal(1, bench.Gate.PulsesUsed);
    }

    [Fact]
    public void A_limit_of_none_lets_none_out()
    {
        using var none = new GateBench(new GateLimits { PulsesPerSession = 0 }).Armed();
        using var noneAMinute = new GateBench(new GateLimits { PulsesPerMinute = 0 }).Armed();

        Assert.Equal(OutcomeKind.OverLimit, none.Round(101));
        Assert.Equal(OutcomeKind.OverLimit, noneAMinute.Round(101));
    }

    [Fact]
    public void A_rehearsal_meets_limits_and_goes_on()
    {
        using var bench = new GateBench(new GateLimits { PulsesPerSession = 1 }, mayBeArmed: false).Opened();

        Assert.Equal(OutcomeKind.Rehearsed, bench.Round(101));
        Assert.Equal(OutcomeKind.OverLimit, bench.Round(102));
        Assert.Equal(GateState.Rehearsing, bench.Gate.State);
    }
}
