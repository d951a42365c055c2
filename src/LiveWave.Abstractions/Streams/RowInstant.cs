namespace LiveWave.Abstractions;

/// <summary>When a row is, after repair.</summary>
/// <param name="Received">Its number as the feed counted it: keys files, cues, block borders and lots.</param>
/// <param name="Index">Its number on the sampling grid, which jumps by what was lost: durations, rests and the frame grid.</param>
/// <param name="StampSeconds">Corrected stamp in seconds of our clock.</param>
/// <param name="Breaks">A gap or restart just before it.</param>
public readonly record struct RowInstant(long Received, long Index, double StampSeconds, RowBreaks Breaks = RowBreaks.None);
