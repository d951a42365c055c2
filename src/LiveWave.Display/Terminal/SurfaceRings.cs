using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>From the decision thread to the view's: observers copy what the surface tells into rings, the view empties them.</summary>
/// <remarks>The observers neither wait nor allocate; what does not fit is counted, and the view says so.</remarks>
internal sealed class SurfaceRings : IDisposable
{
    // A tenth of a second of a recording played a hundred times as fast as it was made.
    private const int MostReadings = 8192;
    private const int MostBlocks = 4096;
    private const int MostOthers = 1024;

    private readonly OneProducerRing<Reading> _readings = new(MostReadings);
    private readonly OneProducerRing<RunGlance> _runs = new(MostBlocks);
    private readonly OneProducerRing<WaveEvent> _events = new(MostOthers);
    private readonly OneProducerRing<Verdict> _verdicts = new(MostOthers);
    private readonly OneProducerRing<Status> _statuses = new(MostOthers);
    private readonly List<IDisposable> _subscriptions = [];
    private readonly StreamLoop _loop;
    private readonly LatencyLedger _ledger;

    public SurfaceRings(RunSurface surface, StreamLoop loop, LatencyLedger ledger)
    {
        _loop = loop;
        _ledger = ledger;
        _subscriptions.Add(surface.Readings.Subscribe(reading => _readings.Offer(reading)));
        _subscriptions.Add(surface.Events.Subscribe(wave => _events.Offer(wave)));
        _subscriptions.Add(surface.Verdicts.Subscribe(verdict => _verdicts.Offer(verdict)));
        _subscriptions.Add(surface.Status.Subscribe(status => _statuses.Offer(status)));
        _subscriptions.Add(surface.Blocks.Subscribe(_ => Glance()));
    }

    /// <summary>Empties every ring into a picture. The view's thread.</summary>
    /// <param name="picture">Filled.</param>
    public void DrainInto(SessionPicture picture)
    {
        while (_readings.TryTake(out var reading)) picture.Take(reading);
        while (_events.TryTake(out var wave)) picture.Take(wave);
        while (_verdicts.TryTake(out var verdict)) picture.Take(verdict);
        while (_statuses.TryTake(out var status)) picture.Take(status);
        while (_runs.TryTake(out var run)) picture.Take(run);
        picture.Missed = _readings.Refused + _runs.Refused + _events.Refused + _verdicts.Refused + _statuses.Refused;
    }

    public void Dispose()
    {
        foreach (var subscription in _subscriptions) subscription.Dispose();
    }

    private void Glance()
    {
        var repair = _loop.Repair;
        var run = new RunGlance(
            _loop.NewestStampSeconds, _ledger.NewestBlockSeconds, _loop.Rows, repair.LostRows, repair.Gaps, _loop.BlankedRows);
        _runs.Offer(run);
    }
}
