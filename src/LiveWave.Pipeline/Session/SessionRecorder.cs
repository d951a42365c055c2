using System.Reactive.Disposables;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Writes a run's tables and log from a thread of its own.</summary>
/// <remarks>The decision thread only copies values into bounded rings. What finds no place is counted and reported: a table with
/// holes is marked, never silent. Everything goes to the operating system at every turn, to the medium twice a second.</remarks>
public sealed class SessionRecorder : IDisposable
{
    private const int Capacity = 4096;
    private const int TurnMs = 50;
    private const int TurnsPerMediumFlush = 10;
    private readonly OneProducerRing<WaveEvent> _events = new(Capacity);
    private readonly OneProducerRing<Decision> _decisions = new(Capacity);
    private readonly OneProducerRing<Outcome> _outcomes = new(Capacity);
    private readonly OneProducerRing<ClockNote> _notes = new(Capacity);
    private readonly OneProducerRing<Status> _statuses = new(Capacity);
    private readonly SessionTables _tables;
    private readonly StatusLog _log;
    private readonly StatusBoard _board;
    private readonly Thread _thread;
    private readonly AutoResetEvent _wake = new(initialState: false);
    private readonly CompositeDisposable _subscriptions;
    private readonly CancellationTokenSource _stop = new();
    private double _firstStamp = double.NaN;
    private int _lastBlockRows = -1;
    private bool _hasFailed;
    private bool _isDisposed;

    /// <summary>Creates the files, listens and starts the thread.</summary>
    /// <param name="folder">Where.</param>
    /// <param name="surface">The run.</param>
    /// <param name="board">Hears of trouble.</param>
    public SessionRecorder(SessionFolder folder, RunSurface surface, StatusBoard board)
    {
        ArgumentNullException.ThrowIfNull(folder);
        ArgumentNullException.ThrowIfNull(surface);
        _board = board;
        _tables = new SessionTables(folder);
        _log = new StatusLog(folder.At("run.log.jsonl"));
        _subscriptions = new CompositeDisposable(
            surface.Blocks.Subscribe(OnBlock),
            surface.Events.Subscribe(wave => Keep(_events, wave, wave.State == WaveEventState.Quiet)),
            surface.Decisions.Subscribe(decision => Keep(_decisions, decision, isWanted: true)),
            surface.Verdicts.Subscribe(verdict => Keep(_outcomes, verdict.Outcome, isWanted: true)),
            surface.Status.Subscribe(status => Keep(_statuses, status, isWanted: true)));
        _thread = new Thread(Run) { Name = "livewave:record", IsBackground = true };
        _thread.Start();
    }

    /// <summary>Values that found no place: the tables have so many holes.</summary>
    public long Lost => _events.Refused + _decisions.Refused + _outcomes.Refused + _notes.Refused + _statuses.Refused;

    /// <summary>Writes what is left and closes the files. What could not be written is posted to the board.</summary>
    public void Dispose()
    {
        if (_isDisposed) return;
        _isDisposed = true;
        _subscriptions.Dispose();
        _stop.Cancel();
        _ = _wake.Set();
        _thread.Join();
        try
        {
            _tables.Dispose();
            _log.Dispose();
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            if (!_hasFailed) Fail(error);
        }

        _wake.Dispose();
        _stop.Dispose();
    }

    private void OnBlock(SampleBlock block)
    {
        if (double.IsNaN(_firstStamp)) Volatile.Write(ref _firstStamp, block.RawStampSeconds(0));
        if (block.Count != _lastBlockRows)
        {
            _lastBlockRows = block.Count;
            var border = new ClockMeasurement(block.FirstReceived, block.ReceivedSeconds, double.NaN, double.NaN, double.NaN);
            Keep(_notes, new ClockNote(IsBorder: true, border, block.Count), isWanted: true);
        }

        foreach (ref readonly var measurement in block.ClockMeasurements)
        {
            Keep(_notes, new ClockNote(IsBorder: false, measurement, 0), isWanted: true);
        }
    }

    private void Keep<T>(OneProducerRing<T> ring, in T value, bool isWanted)
    {
        if (!isWanted || ring.Offer(value) || ring.Refused > 1) return;
        _board.Post(StatusLevel.Fault, "recorder", "a table has a hole: the disk does not keep up", "use a faster disk");
    }

    private void Run()
    {
        for (var turn = 1; !_stop.IsCancellationRequested; turn++)
        {
            _ = _wake.WaitOne(TurnMs);
            Turn(toMedium: turn % TurnsPerMediumFlush == 0);
        }

        Turn(toMedium: true);
    }

    private void Turn(bool toMedium)
    {
        if (_hasFailed) return;
        try
        {
            while (_notes.TryTake(out var note)) _tables.Add(note);
            while (_events.TryTake(out var wave)) _tables.Add(wave, Volatile.Read(ref _firstStamp));
            while (_decisions.TryTake(out var decision)) _tables.Add(decision);
            while (_outcomes.TryTake(out var outcome)) _tables.Add(outcome);
            while (_statuses.TryTake(out var status)) _log.Add(status);
            _tables.Flush(toMedium);
            _log.Flush(toMedium);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            Fail(error);
        }
    }

    private void Fail(Exception error)
    {
        _hasFailed = true;
        _board.Post(StatusLevel.Fault, "recorder", $"the session folder can't be written: {error.Message}", "free the disk");
    }
}
