using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One array of electrodes on the stream.</summary>
/// <param name="Name">As the sheet calls it.</param>
/// <param name="Channels">Its channels, by number in the stream, in the layout's order.</param>
/// <param name="Layout">Where they lie.</param>
public sealed record PatchSetup(string Name, IReadOnlyList<int> Channels, Layout Layout);
