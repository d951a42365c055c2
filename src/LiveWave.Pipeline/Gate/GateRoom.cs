using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What the lanes of one gate share.</summary>
/// <param name="Arming">The gate's standing.</param>
/// <param name="Clock">The run's clock.</param>
/// <param name="Settling">Where a sender tells that it is through.</param>
/// <param name="Notices">News for people.</param>
/// <param name="Disarm">Disarms the gate without waiting.</param>
internal sealed record GateRoom(
    GateArming Arming, IClock Clock, Settling Settling, GateNotices Notices, Action<string> Disarm);
