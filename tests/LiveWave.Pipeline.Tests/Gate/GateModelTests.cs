using FsCheck.Xunit;
using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

/// <summary>The gate, stepped without threads through any script, does what its plain model does.</summary>
public sealed class GateModelTests
{
    private const double UnitSeconds = 1 / 1024.0;   // sums of it are exact
    private const int MinuteUnits = 60 * 1024;
    private const int PerMinute = 3;
    private const int PerSession = 9;
    private const int ShortestUnits = 4;

    [Property(Replay = "2026,1201", MaxTest = 200)]
    public void A_gate_that_may_be_armed_follows_its_model(byte[] script) => Follow(script, mayBeArmed: true, isDummy: false);

    [Property(Replay = "2026,1201", MaxTest = 100)]
    public void A_gate_with_dummies_that_may_be_armed_follows_its_model(byte[] script) => Follow(script, mayBeArmed: true, isDummy: true);

    [Property(Replay = "2026,1201", MaxTest = 100)]
    public void A_gate_that_may_only_rehearse_follows_its_model(byte[] script) => Follow(script, mayBeArmed: false, isDummy: false);

    [Property(Replay = "2026,1201", MaxTest = 100)]
    public void A_gate_with_dummies_that_may_only_rehearse_follows_its_model(byte[] script) => Follow(script, mayBeArmed: false, isDummy: true);

    private static void Follow(byte[] script, bool mayBeArmed, bool isDummy)
    {
        var clock = new VirtualClock();
        FakeOutput[] outputs = [new FakeOutput(), new FakeOutput()];
        var limits = new GateLimits { PulsesPerMinute = PerMinute, PulsesPerSession = PerSession, ShortestIntervalMs = ShortestUnits * UnitSeconds * 1000 };
        using var gate = new PulseGate(
            [new GateOutput("0", outputs[0]) { IsDummy = isDummy }, new GateOutput("1", outputs[1]) { IsDummy = isDummy }],
            clock, limits, mayBeArmed, allowedLatenessMs: UnitSeconds * 1000);
        var model = new GateModel(mayBeArmed, isDummy, latenessUnits: 1, MinuteUnits, PerMinute, PerSession, ShortestUnits);
        foreach (var output in outputs) output.Throws = _ => model.Throws;
        gate.OpenOutputs();
        var ended = new SortedDictionary<(long, int), OutcomeKind>();

        for (var number = 0; number < script.Length; number++)
        {
            Act(script[number], number, gate, clock, model);
            Assert.Equal((model.State, model.Used), (gate.State, gate.PulsesUsed));
        }

        gate.Dispose();
        model.Disarm();
        while (gate.TryTake(out var outcome)) ended.Add((outcome.Decision, outcome.Output == "0" ? 0 : 1), outcome.Kind);
        Assert.Equal(model.Ended, ended);
        Assert.Equal(model.Asked.Order(), outputs.SelectMany((output, i) => output.Sent.Select(pulse => (pulse.Decision, i))).Order());
    }

    private static void Act(byte step, int number, PulseGate gate, VirtualClock clock, GateModel model)
    {
        var argument = step / 16;
        switch (step % 16)
        {
            case 0 or 1 or 2:
                Commit(number, isSham: argument == 0, model.Now + (argument % 5) - 1, argument % 2, gate, model);
                break;
            case 3:
                Commit(number, isSham: argument % 4 == 0, model.Now + (argument % 5), 0, gate, model);
                Commit(number, isSham: argument % 4 == 0, model.Now + (argument % 5), 1, gate, model);
                break;
            case 4 or 5 or 6 or 7:
                model.Move(argument == 15 ? MinuteUnits - 1 : 1 + (argument % 3));
                clock.MoveTo(model.Now * UnitSeconds);
                break;
            case 8 or 9 or 10 or 11:
                model.Step(argument % 2);
                gate.Lane(argument % 2).LastInstant();
                break;
            case 12 or 13:
                Assert.Equal(model.Arm(), Try(gate.Arm));
                break;
            case 14:
                if (argument % 2 == 0) Assert.Equal(model.Rehearse(), Try(gate.Rehearse));
                else if (argument % 4 == 1) model.Throws = argument == 13;
                break;
            default:
                model.Disarm();
                gate.Disarm("a gap");
                break;
        }
    }

    private static void Commit(int number, bool isSham, int due, int output, PulseGate gate, GateModel model)
    {
        var decision = new Decision { Number = number, Rule = "", Kind = isSham ? DecisionKind.Sham : DecisionKind.Pulse, DueSeconds = due * UnitSeconds };
        var stages = GateBench.Stages(due * UnitSeconds);
        model.Commit(number, isSham, due, output);
        gate.Commit(in decision, in stages, output);
    }

    private static bool Try(Action act)
    {
        try
        {
            act();
            return true;
        }
        catch (RefusedException)
        {
            return false;
        }
    }
}
