namespace LiveWave.Abstractions;

/// <summary>Where pulses go. Sends nothing when opened, closed or disposed.</summary>
/// <remarks><see cref="Send"/> runs on the output's own thread and may block or throw. <see cref="Quiet"/> and
/// <see cref="IDisposable.Dispose"/> may be called from another thread while it is stuck, and must free it.</remarks>
public interface IOutput : IDisposable
{
    /// <summary>Opens the device.</summary>
    /// <exception cref="RefusedException">It can't be opened.</exception>
    void Open();

    /// <summary>Sends one pulse, now.</summary>
    /// <param name="pulse">The pulse.</param>
    void Send(in Pulse pulse);

    /// <summary>Brings the output to rest, at once.</summary>
    void Quiet();
}
