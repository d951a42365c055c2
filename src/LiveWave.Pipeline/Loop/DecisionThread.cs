namespace LiveWave.Pipeline;

/// <summary>Runs a loop on a thread of its own until it is over, stopped, or fails.</summary>
public sealed class DecisionThread : IDisposable
{
    private readonly StreamLoop _loop;
    private readonly PulseGate _gate;
    private readonly Thread _thread;
    private readonly ManualResetEventSlim _over = new();
    private volatile bool _isStopping;

    /// <summary>Makes the thread, named <c>livewave:decide</c>; it does not run yet.</summary>
    /// <param name="loop">The loop.</param>
    /// <param name="gate">Disarmed at once if the loop fails; at an orderly end whoever made it ends it.</param>
    public DecisionThread(StreamLoop loop, PulseGate gate)
    {
        _loop = loop;
        _gate = gate;
        _thread = new Thread(Run) { Name = "livewave:decide", IsBackground = true, Priority = ThreadPriority.AboveNormal };
    }

    /// <summary>What ended it, if it was an error.</summary>
    public Exception? Failure { get; private set; }

    /// <summary>Starts.</summary>
    public void Start() => _thread.Start();

    /// <summary>Asks it to end after the turn in hand. Any thread.</summary>
    public void Stop() => _isStopping = true;

    /// <summary>Waits until it is over.</summary>
    /// <param name="atMost">No longer than this.</param>
    /// <returns>True if it is over.</returns>
    public bool Wait(TimeSpan atMost) => _over.Wait(atMost);

    /// <inheritdoc/>
    public void Dispose()
    {
        Stop();
        if (_thread.IsAlive) _thread.Join();
        _over.Dispose();
    }

    private void Run()
    {
        try
        {
            while (!_isStopping && _loop.RunOnce())
            {
            }

            _loop.Finish(RunEnd.Stopped);
        }
        catch (Exception error)
        {
            Failure = error;
        }
        finally
        {
            if (Failure is not null) _gate.DisarmWithoutWaiting("the decision thread failed");
            _over.Set();
        }
    }
}
