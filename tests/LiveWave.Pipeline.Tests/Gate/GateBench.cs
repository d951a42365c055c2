using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

/// <summary>A gate on a virtual clock with fake outputs 'a' and 'b'. Stepped by the test unless it is opened with threads.</summary>
internal sealed class GateBench : IDisposable
{
    private long _number;

    public GateBench(
        GateLimits? limits = null,
        bool mayBeArmed = true,
        bool isDummy = false,
        double patienceMs = 1000,
        Func<VirtualClock, IClock>? seenAs = null,
        bool recorded = true)
    {
        Gate = new PulseGate(
            [
                new GateOutput("a", recorded ? A : new NoOutput()) { PatienceMs = patienceMs, IsDummy = isDummy },
                new GateOutput("b", B) { PatienceMs = patienceMs, IsDummy = isDummy },
            ],
            seenAs?.Invoke(Clock) ?? Clock,
            limits ?? new GateLimits(),
            mayBeArmed);
    }

    public VirtualClock Clock { get; } = new(100);

    public FakeOutput A { get; } = new();

    public FakeOutput B { get; } = new();

    public PulseGate Gate { get; }

    /// <summary>Opened without threads, and armed.</summary>
    public GateBench Armed()
    {
        Gate.OpenOutputs();
        Gate.Arm();
        return this;
    }

    /// <summary>Opened without threads.</summary>
    public GateBench Opened()
    {
        Gate.OpenOutputs();
        return this;
    }

    public Decision Decide(double dueSeconds, DecisionKind kind = DecisionKind.Pulse, int code = 0) => new()
    {
        Number = ++_number,
        Rule = "towards-anterior",
        Patch = "quill",
        Band = "rhythm",
        EventNumber = 7,
        Kind = kind,
        DueSeconds = dueSeconds,
        Code = code,
        PredictedPhaseDegrees = double.NaN,
    };

    public long Commit(double dueSeconds, DecisionKind kind = DecisionKind.Pulse, int output = 0, int code = 0)
    {
        var decision = Decide(dueSeconds, kind, code);
        var stages = Stages(Clock.NowSeconds - 0.01);
        Gate.Commit(in decision, in stages, output);
        return decision.Number;
    }

    /// <summary>Moves the clock there and lets an output's sender take its last instant.</summary>
    public void StepAt(double seconds, int output = 0)
    {
        Clock.MoveTo(seconds);
        Gate.Lane(output).LastInstant();
    }

    public Outcome Take()
    {
        Assert.True(Gate.TryTake(out var outcome), "an outcome was expected");
        return outcome;
    }

    /// <summary>Commits, lets the instant come, and takes the outcome.</summary>
    public OutcomeKind Round(double dueSeconds, DecisionKind kind = DecisionKind.Pulse)
    {
        _ = Commit(dueSeconds, kind);
        StepAt(dueSeconds);
        return Take().Kind;
    }

    public static StageStamps Stages(double acquiredSeconds) => new(
        acquiredSeconds, acquiredSeconds + 0.001, acquiredSeconds + 0.002, acquiredSeconds + 0.003, acquiredSeconds + 0.004, double.NaN, double.NaN, double.NaN);

    public void Dispose()
    {
        Clock.Close();
        Gate.Dispose();
    }
}
