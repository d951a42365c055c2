namespace LiveWave.Abstractions;

/// <summary>An anatomical name for a direction of the array.</summary>
/// <param name="Name">E.g. <c>anterior</c>.</param>
/// <param name="Degrees">Counter-clockwise from +x, after rotation.</param>
public sealed record NamedAxis(string Name, double Degrees);
