using System.Reactive.Disposables;
using System.Reactive.Linq;
using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Counts what a run told: readings, wave events, decisions, outcomes. Listens on the surface, decides nothing.</summary>
internal sealed class RunTally : IDisposable
{
    private readonly CompositeDisposable _subscriptions;

    public RunTally(RunSurface surface) => _subscriptions = new CompositeDisposable(
        surface.Readings.Subscribe(Count),
        surface.Events.Where(wave => wave.State == WaveEventState.Quiet).Subscribe(Waves.Add),
        surface.Decisions.Subscribe(Decisions.Add),
        surface.Verdicts.Subscribe(verdict => Outcomes.Add(verdict.Outcome)),
        surface.Status.Subscribe(Statuses.Add));

    public long Frames { get; private set; }

    public long ValidFrames { get; private set; }

    public List<WaveEvent> Waves { get; } = [];

    public List<Decision> Decisions { get; } = [];

    public List<Outcome> Outcomes { get; } = [];

    public List<Status> Statuses { get; } = [];

    public int CountOf(DecisionKind kind) => Decisions.Count(decision => decision.Kind == kind);

    public int CountOf(OutcomeKind kind) => Outcomes.Count(outcome => outcome.Kind == kind);

    /// <summary>Holds by the condition that failed, most frequent first.</summary>
    public IReadOnlyList<(Condition Failed, int Count)> Holds() =>
    [
        .. Decisions.Where(decision => decision.Kind == DecisionKind.Hold)
            .GroupBy(decision => decision.Failed)
            .Select(group => (group.Key, group.Count()))
            .OrderByDescending(pair => pair.Item2)
            .ThenBy(pair => pair.Key),
    ];

    /// <summary>Events by kind, in the order of the kinds.</summary>
    public IReadOnlyList<(WaveKind Kind, int Count)> Kinds() =>
        [.. Waves.GroupBy(wave => wave.Kind).Select(group => (group.Key, group.Count())).OrderBy(pair => pair.Key)];

    public void Dispose() => _subscriptions.Dispose();

    private void Count(Reading reading)
    {
        Frames++;
        if (reading.IsValid) ValidFrames++;
    }
}
