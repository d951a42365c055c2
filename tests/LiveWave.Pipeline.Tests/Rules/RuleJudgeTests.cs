using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class RuleJudgeTests
{
    private static readonly RuleSetup Rule = new()
    {
        Name = "toward-135",
        Track = 0,
        Kind = WaveKind.Planar,
        DirectionDegrees = 135,
        ToleranceDegrees = 30,
        StandardErrorDegrees = 20,
        LeadMs = 20,
        RestMs = 1000,
        Code = 7,
        Outputs = [0],
    };

    [Fact]
    public void A_wave_that_meets_all_conditions_is_decided_at_once_and_only_once()
    {
        var judge = Judge(Rule);

        var first = judge.Judge(Wave(1, 140), 8, At(500), out var decision);
        var again = judge.Judge(Wave(1, 140), 9, At(501), out _);
        var closed = judge.Close(Wave(1, 140), out _);

        Assert.True(first);
        Assert.False(again);
        Assert.False(closed);
        Assert.Equal(DecisionKind.Pulse, decision.Kind);
        Assert.Equal(7, decision.Code);
        Assert.Equal(At(500).StampSeconds + 0.020, decision.DueSeconds, 12);
    }

    [Theory]
    [InlineData(105.0, true)]
    [InlineData(165.0, true)]
    [InlineData(104.9, false)]
    [InlineData(165.1, false)]
    [InlineData(-225.0, true)]
    [InlineData(315.0, false)]
    public void The_sector_includes_its_borders_and_goes_round_the_circle(double direction, bool isIn) =>
        Assert.Equal(isIn, Judge(Rule).Judge(Wave(1, direction), 8, At(500), out _));

    [Fact]
    public void A_sector_across_zero_holds_both_sides()
    {
        var judge = Judge(Rule with { DirectionDegrees = 5 });

        Assert.True(judge.Judge(Wave(1, 340), 8, At(500), out _));
        Assert.False(judge.Judge(Wave(2, 330), 8, At(2500), out _));
    }

    [Fact]
    public void An_event_without_a_match_ends_in_one_hold_that_names_the_first_failing_condition_at_its_best_row()
    {
        var judge = Judge(Rule);
        _ = judge.Judge(Wave(1, 20), 30, At(500), out _);
        _ = judge.Judge(Wave(1, 130, error: 25), 6, At(504), out _);
        _ = judge.Judge(Wave(1, 130, error: 22), 9, At(508), out _);
        _ = judge.Judge(Wave(1, 10), 40, At(512), out _);

        var closed = judge.Close(Wave(1, 10), out var hold);

        Assert.True(closed);
        Assert.Equal(DecisionKind.Hold, hold.Kind);
        Assert.Equal(Condition.StandardError, hold.Failed);
        Assert.Equal(508, hold.At.Received);
        Assert.True(double.IsNaN(hold.DueSeconds));
    }

    [Fact]
    public void Another_kind_fails_first_whatever_else_is_wrong()
    {
        var judge = Judge(Rule);
        _ = judge.Judge(Wave(1, 20) with { Kind = WaveKind.Expanding }, 30, At(500), out _);

        _ = judge.Close(Wave(1, 20), out var hold);

        Assert.Equal(Condition.Kind, hold.Failed);
    }

    [Fact]
    public void A_standard_error_that_is_not_known_does_not_pass()
    {
        var judge = Judge(Rule);

        Assert.False(judge.Judge(Wave(1, 135, error: double.NaN), 8, At(500), out _));
        Assert.True(Judge(Rule with { StandardErrorDegrees = double.PositiveInfinity }).Judge(Wave(1, 135, error: double.NaN), 8, At(500), out _));
    }

    [Fact]
    public void Rest_counts_rows_of_the_grid_after_a_pulse_or_sham()
    {
        var judge = Judge(Rule with { ShamFraction = 1 });
        Assert.True(judge.Judge(Wave(1, 135), 8, At(500), out var sham));

        var tooSoon = judge.Judge(Wave(2, 135), 8, At(1499), out _);
        var rested = judge.Judge(Wave(2, 135), 8, At(1500), out _);

        Assert.Equal(DecisionKind.Sham, sham.Kind);
        Assert.False(tooSoon);
        Assert.True(rested);
    }

    [Fact]
    public void A_sham_differs_from_a_pulse_in_nothing_but_its_kind()
    {
        Assert.True(Judge(Rule with { ShamFraction = 0 }).Judge(Wave(1, 135), 8, At(500), out var pulse));
        Assert.True(Judge(Rule with { ShamFraction = 1 }).Judge(Wave(1, 135), 8, At(500), out var sham));

        Assert.Equal(pulse, sham with { Kind = DecisionKind.Pulse });
    }

    [Fact]
    public void Lots_follow_seed_session_rule_and_onset_and_nothing_else()
    {
        var lots = Lots(Rule, 1, "one");

        Assert.Equal(lots, Lots(Rule with { RestMs = 0, Code = 3 }, 1, "one"));
        Assert.NotEqual(lots, Lots(Rule, 2, "one"));
        Assert.NotEqual(lots, Lots(Rule, 1, "two"));
        Assert.NotEqual(lots, Lots(Rule with { Name = "other" }, 1, "one"));
    }

    [Fact]
    public void About_as_many_shams_are_drawn_as_the_sheet_says()
    {
        var judge = Judge(Rule with { ShamFraction = 0.2, RestMs = 0 });
        var shams = 0;
        for (var number = 1; number <= 5000; number++)
        {
            Assert.True(judge.Judge(Wave(number, 135), 8, At(1000 * number), out var decision));
            if (decision.Kind == DecisionKind.Sham) shams++;
        }

        Assert.InRange(shams, 1000 - 113, 1000 + 113);   // four standard deviations of 5000 draws at 0.2
    }

    private static double[] Lots(RuleSetup rule, ulong seed, string session)
    {
        var judge = new RuleJudge(rule with { RestMs = 0 }, 1000, seed, session);
        return [.. Enumerable.Range(1, 20).Select(number =>
        {
            _ = judge.Judge(Wave(number, 135), 8, At(1000 * number), out var decision);
            return decision.Lot;
        })];
    }

    private static RuleJudge Judge(RuleSetup rule) => new(rule, rateHz: 1000, seed: 1, sessionId: "test");

    private static RowInstant At(long row) => new(row, row, 100 + (row / 1000.0));

    private static WaveEvent Wave(long number, double direction, double error = 5) => new()
    {
        Number = number,
        Patch = "quill",
        Band = "beta",
        Estimator = "planar",
        State = WaveEventState.Passing,
        Kind = WaveKind.Planar,
        Onset = At((1000 * number) - 600),
        DirectionDegrees = direction,
        DirectionStandardErrorDegrees = error,
    };
}
