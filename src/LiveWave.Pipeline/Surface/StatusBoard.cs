using System.Collections.Concurrent;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Collects statuses from every thread until the decision thread publishes them.</summary>
/// <remarks>Nothing on the way to a decision posts here in a healthy run.</remarks>
public sealed class StatusBoard
{
    private readonly ConcurrentQueue<Status> _waiting = new();
    private readonly IClock _clock;

    /// <summary>Makes a board.</summary>
    /// <param name="clock">Stamps statuses.</param>
    public StatusBoard(IClock clock) => _clock = clock;

    /// <summary>Posts a status. Any thread.</summary>
    /// <param name="level">How much it matters.</param>
    /// <param name="where">Which stage, channel, output or file.</param>
    /// <param name="what">What happened.</param>
    /// <param name="advice">What to do; empty if nothing.</param>
    public void Post(StatusLevel level, string where, string what, string advice) =>
        _waiting.Enqueue(new Status(level, where, what, advice, _clock.NowSeconds));

    /// <summary>Takes the oldest status not yet published. Does not allocate.</summary>
    /// <param name="status">The status.</param>
    /// <returns>False if there is none.</returns>
    public bool TryTake(out Status status) => _waiting.TryDequeue(out status);
}
