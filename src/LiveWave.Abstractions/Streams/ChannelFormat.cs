namespace LiveWave.Abstractions;

/// <summary>What one channel of a stream carries: physical value = wire value × scale + offset.</summary>
/// <param name="Label">Unique within the stream, e.g. <c>r4c2</c>.</param>
/// <param name="Unit">Unit of the physical value as the stream names it, e.g. <c>microvolts</c>.</param>
/// <param name="Scale">Physical units per wire unit.</param>
/// <param name="Offset">Physical value at wire value 0.</param>
public sealed record ChannelFormat(string Label, string Unit, double Scale = 1, double Offset = 0);
