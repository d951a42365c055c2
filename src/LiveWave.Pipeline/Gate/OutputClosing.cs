namespace LiveWave.Pipeline;

/// <summary>Brings an output to rest and disposes it, once, from threads of its own: either call may free a stuck sender,
/// either may be stuck itself, and whoever asked for it may not wait.</summary>
/// <param name="output">The output.</param>
/// <param name="settling">Where to tell that it is closed.</param>
/// <param name="isIdle">No send is under way.</param>
/// <param name="fail">Told why the output did not come to rest.</param>
internal sealed class OutputClosing(GateOutput output, Settling settling, Func<bool> isIdle, Action<string> fail)
{
    private int _isStarted;
    private volatile bool _isClosed;
    private volatile bool _needsQuiet;

    internal TimeSpan Patience { get; } = TimeSpan.FromMilliseconds(output.PatienceMs);

    /// <summary>Both calls were made, and returned or used up their patience.</summary>
    internal bool IsClosed => _isClosed;

    /// <summary>How long closing may take in all: the send under way, quiet, the sender, dispose.</summary>
    internal static TimeSpan Longest(TimeSpan patience) => (4 * patience) + TimeSpan.FromSeconds(1);   // a second to start threads

    /// <summary>The output is about to be opened. One that never was is not asked to be quiet: it touched no device.</summary>
    internal void WillNeedQuiet() => _needsQuiet = true;

    /// <summary>Any thread: begins to close, the first time it is called.</summary>
    /// <param name="sender">The sender thread that should leave before the output is disposed; null: dispose at once, to free it.</param>
    internal void Start(Thread? sender)
    {
        if (Interlocked.Exchange(ref _isStarted, 1) != 0) return;
        _ = Run("livewave:close:", () => Close(sender));
    }

    /// <summary>Any thread: waits until it is closed, within bounds.</summary>
    internal void AwaitClosed() => _ = settling.Await(() => _isClosed, Longest(Patience));

    private void Close(Thread? sender)
    {
        // A send whose last questions were answered before the run was disarmed may be about to start: brought to rest before it,
        // the output would not be at rest after it.
        if (sender is not null) _ = settling.Await(isIdle, Patience);
        if (_needsQuiet) Bounded("quiet", output.Output.Quiet);
        _ = sender?.Join(Patience);
        Bounded("dispose", output.Output.Dispose);
        _isClosed = true;
        settling.Tell();
    }

    private void Bounded(string what, Action act)
    {
        Exception? failure = null;
        var thread = Run($"livewave:{what}:", () =>
        {
            try
            {
                act();
            }
            catch (Exception error)
            {
                failure = error;
            }
        });
        if (!thread.Join(Patience)) fail($"it did not come to rest: '{what}' took longer than its patience");
        else if (failure is not null) fail($"it did not come to rest: '{what}' failed: {failure.Message}");
    }

    private Thread Run(string role, Action act)
    {
        var thread = new Thread(() => act()) { Name = role + output.Name, IsBackground = true };
        thread.Start();
        return thread;
    }
}
