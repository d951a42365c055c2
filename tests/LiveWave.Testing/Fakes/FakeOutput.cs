using LiveWave.Abstractions;

namespace LiveWave.Testing;

/// <summary>An output that notes every call, and throws or blocks when told to. Blocked, it is freed by quiet or dispose.</summary>
public sealed class FakeOutput : IOutput
{
    private readonly ManualResetEventSlim _freed = new();
    private readonly List<Pulse> _sent = [];
    private int _quietCount;
    private int _disposeCount;
    private volatile bool _isDisposed;

    /// <summary>Called at the entry of <see cref="Send"/>, on the sender's thread.</summary>
    public Action<Pulse>? OnSend { get; set; }

    /// <summary>Which sends throw.</summary>
    public Func<Pulse, bool> Throws { get; set; } = _ => false;

    /// <summary>Which sends block until the output is made quiet or disposed.</summary>
    public Func<Pulse, bool> Blocks { get; set; } = _ => false;

    /// <summary>Whether <see cref="Quiet"/> frees a blocked send; otherwise only <see cref="Dispose"/> does.</summary>
    public bool QuietFrees { get; set; } = true;

    /// <summary>Blocks in <see cref="Quiet"/> until it is disposed.</summary>
    public bool QuietBlocks { get; set; }

    /// <summary>Set once a send blocks.</summary>
    public ManualResetEventSlim Blocked { get; } = new();

    /// <summary>Set once it is disposed.</summary>
    public ManualResetEventSlim Disposed { get; } = new();

    public int OpenCount { get; private set; }

    public int QuietCount => Volatile.Read(ref _quietCount);

    public int DisposeCount => Volatile.Read(ref _disposeCount);

    public bool IsDisposed => _isDisposed;

    public int SentCount
    {
        get
        {
            lock (_sent) return _sent.Count;
        }
    }

    /// <summary>What was sent, blocked and refused ones too.</summary>
    public IReadOnlyList<Pulse> Sent
    {
        get
        {
            lock (_sent) return [.. _sent];
        }
    }

    public void Open() => OpenCount++;

    public void Send(in Pulse pulse)
    {
        OnSend?.Invoke(pulse);
        ObjectDisposedException.ThrowIf(_isDisposed, this);
        lock (_sent) _sent.Add(pulse);
        if (Throws(pulse)) throw new IOException("the line is cut");
        if (!Blocks(pulse)) return;
        Blocked.Set();
        _freed.Wait();
        throw new IOException("the handle was closed");
    }

    public void Quiet()
    {
        _ = Interlocked.Increment(ref _quietCount);
        if (QuietFrees) _freed.Set();
        if (QuietBlocks) _freed.Wait();
    }

    public void Dispose()
    {
        _ = Interlocked.Increment(ref _disposeCount);
        _isDisposed = true;
        _freed.Set();
        Disposed.Set();
    }
}
