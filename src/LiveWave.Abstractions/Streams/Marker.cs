namespace LiveWave.Abstractions;

/// <summary>One event of a marker stream.</summary>
/// <param name="Stream">The stream's name.</param>
/// <param name="Text">What it says.</param>
/// <param name="StampSeconds">Raw stamp in seconds of the stream's clock.</param>
public readonly record struct Marker(string Stream, string Text, double StampSeconds);
