using FsCheck.Xunit;
using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

/// <summary>Decisions are a pure function of the rows as received, the setup, seed and session id.</summary>
public sealed class DecisionLaws
{
    private static readonly RunSetup Setup = Rig.Setup();
    private static readonly double[][] Rows = Rig.Rows(Setup, seconds: 12);
    private static readonly string Reference = Rig.Play(Setup, Feed(), blockRows: 32).Tables();

    [Fact]
    public void The_rows_hold_pulses_shams_and_holds()
    {
        var rig = Rig.Play(Setup, Feed(), blockRows: 32);

        Assert.All(Enum.GetValues<DecisionKind>(), kind => Assert.Contains(rig.Decisions, decision => decision.Kind == kind));
        Assert.True(rig.Decisions.Count >= 10, $"{rig.Decisions.Count} decisions");
    }

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    [InlineData(32)]
    [InlineData(50)]
    [InlineData(1000)]
    public void Tables_are_the_same_byte_for_byte_whatever_the_block_size(int blockRows) =>
        Assert.Equal(Reference, Rig.Play(Setup, Feed(), blockRows).Tables());

    [Fact]
    public void Later_rows_change_nothing_that_was_decided_before()
    {
        var half = Rows.Length / 2;
        var changed = Rows.Select((row, i) => i < half ? row : [.. row.Select(value => -3 * value)]).ToArray();

        var before = Acts(Rig.Play(Setup, Feed(), blockRows: 32)).Where(decision => decision.At.Received < half).ToList();
        var after = Acts(Rig.Play(Setup, new FakeFeed(Setup.Format, changed), blockRows: 32)).Where(decision => decision.At.Received < half);

        Assert.NotEmpty(before);
        Assert.Equal(before, after);
    }

    [Fact]
    public void Another_session_draws_other_lots_and_decides_at_the_same_rows()
    {
        var one = Acts(Rig.Play(Setup, Feed(), blockRows: 32));
        var two = Acts(Rig.Play(Setup with { SessionId = "another" }, Feed(), blockRows: 32));

        Assert.Equal(one.Select(decision => decision.At), two.Select(decision => decision.At));
        Assert.NotEqual(one.Select(decision => decision.Lot), two.Select(decision => decision.Lot));
    }

    [Property(Replay = "2026,1201", MaxTest = 25)]
    public void Outcomes_never_change_decisions(byte[] script, bool throws, bool isBusy)
    {
        var output = new MoodyOutput(throws, isBusy);

        var rig = Rig.Play(Setup, Feed(), blockRows: 10, (turn, gate) => Act(script, turn, gate), output);

        Assert.Equal(Reference, rig.Tables());
    }

    [Fact]
    public void Every_decision_ends_in_one_verdict()
    {
        var rig = Rig.Play(Setup, Feed(), blockRows: 10);

        Assert.Equal(rig.Decisions.Select(decision => decision.Number).Order(), rig.Verdicts.Select(verdict => verdict.Decision.Number).Order());
        Assert.All(rig.Verdicts, verdict => Assert.Equal(
            verdict.Decision.Kind switch
            {
                DecisionKind.Hold => OutcomeKind.NothingDue,
                DecisionKind.Sham => OutcomeKind.Withheld,
                _ => OutcomeKind.Rehearsed,
            },
            verdict.Outcome.Kind));
    }

    [Fact]
    public void Pulses_are_due_their_lead_after_the_deciding_row_and_rehearsed_on_the_instant()
    {
        var rig = Rig.Play(Setup, Feed(), blockRows: 5);

        Assert.All(rig.Verdicts.Where(verdict => verdict.Outcome.Kind == OutcomeKind.Rehearsed), verdict =>
        {
            Assert.Equal(verdict.Decision.At.StampSeconds + 0.020, verdict.Decision.DueSeconds, 9);
            Assert.Equal(verdict.Decision.DueSeconds, verdict.Outcome.Stages.SentSeconds, 9);
        });
    }

    [Fact]
    public void Blocks_longer_than_the_lead_make_pulses_late_and_change_no_decision()
    {
        var rig = Rig.Play(Setup, Feed(), blockRows: 100);

        Assert.Contains(rig.Verdicts, verdict => verdict.Outcome.Kind == OutcomeKind.Late);
        Assert.Equal(Reference, rig.Tables());
    }

    private static FakeFeed Feed() => new(Setup.Format, Rows);

    private static List<Decision> Acts(Rig rig) => [.. rig.Decisions.Where(decision => decision.Kind != DecisionKind.Hold)];

    private static void Act(byte[] script, int turn, PulseGate gate)
    {
        if (script.Length == 0) return;
        switch (script[turn % script.Length] % 16)
        {
            case 0:
                gate.DisarmWithoutWaiting("the test says so");
                break;
            case 1:
                try
                {
                    gate.Rehearse();
                }
                catch (RefusedException)
                {
                    // a faulty output: it stays disarmed
                }

                break;
        }
    }

    private sealed class MoodyOutput(bool throws, bool isBusy) : IOutput
    {
        public void Open()
        {
        }

        public void Send(in Pulse pulse)
        {
            if (isBusy) Thread.Yield();
            if (throws) throw new InvalidOperationException("the stimulator says no");
        }

        public void Quiet()
        {
        }

        public void Dispose()
        {
        }
    }
}
