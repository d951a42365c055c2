namespace LiveWave.Pipeline;

/// <summary>Our observable: synchronous, in order of subscription, and an observer that throws is cut off and reported.</summary>
/// <typeparam name="T">What is told.</typeparam>
/// <remarks>Told from one thread, the decision thread, and never from inside an observer; subscribing is safe from any thread.
/// Telling allocates nothing.</remarks>
public sealed class Tap<T> : IObservable<T>
{
    private readonly Lock _subscribing = new();
    private readonly Action<string, Exception> _report;
    private readonly string _name;
    private Listener[] _listeners = [];
    private bool _isDone;

    /// <summary>Makes a tap.</summary>
    /// <param name="name">What it tells, for reports.</param>
    /// <param name="report">Hears of an observer that threw.</param>
    public Tap(string name, Action<string, Exception> report)
    {
        _name = name;
        _report = report;
    }

    /// <summary>True if somebody listens.</summary>
    public bool HasObservers => Volatile.Read(ref _listeners).Length > 0;

    /// <inheritdoc/>
    public IDisposable Subscribe(IObserver<T> observer)
    {
        ArgumentNullException.ThrowIfNull(observer);
        var listener = new Listener(this, observer);
        lock (_subscribing)
        {
            if (!_isDone)
            {
                _listeners = [.. _listeners, listener];
                return listener;
            }
        }

        observer.OnCompleted();
        return listener;
    }

    /// <summary>Tells everyone.</summary>
    /// <param name="value">What.</param>
    public void Tell(in T value)
    {
        foreach (var listener in Volatile.Read(ref _listeners))
        {
            try
            {
                listener.Observer.OnNext(value);
            }
            catch (Exception error)
            {
                listener.Dispose();
                _report($"an observer of {_name} failed and was cut off", error);
            }
        }
    }

    /// <summary>The stream ended.</summary>
    public void Complete()
    {
        Listener[] last;
        lock (_subscribing)
        {
            _isDone = true;
            last = _listeners;
            _listeners = [];
        }

        foreach (var listener in last)
        {
            try
            {
                listener.Observer.OnCompleted();
            }
            catch (Exception error)
            {
                _report($"an observer of {_name} failed at the end", error);
            }
        }
    }

    private void Remove(Listener listener)
    {
        lock (_subscribing) _listeners = [.. _listeners.Where(other => other != listener)];
    }

    private sealed class Listener(Tap<T> tap, IObserver<T> observer) : IDisposable
    {
        public IObserver<T> Observer { get; } = observer;

        public void Dispose() => tap.Remove(this);
    }
}
