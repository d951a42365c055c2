using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Discards every pulse: where a rule should run its whole way and nothing is connected. In a sheet: <c>none</c>.</summary>
public sealed class NoOutput : IOutput
{
    private volatile bool _isDisposed;

    /// <inheritdoc/>
    public void Open() => ObjectDisposedException.ThrowIf(_isDisposed, this);

    /// <inheritdoc/>
    /// <exception cref="ObjectDisposedException">It was disposed.</exception>
    public void Send(in Pulse pulse) => ObjectDisposedException.ThrowIf(_isDisposed, this);

    /// <inheritdoc/>
    public void Quiet()
    {
        // It is always at rest.
    }

    /// <inheritdoc/>
    public void Dispose() => _isDisposed = true;
}
