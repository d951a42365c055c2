namespace LiveWave.Recordings;

/// <summary>What a recording says of one channel.</summary>
/// <param name="Label">Its name; empty where the file gives none.</param>
/// <param name="Unit">Unit of the physical value; empty where the file gives none.</param>
/// <param name="Conversion">Physical units per number in the file; 1 where the file gives none.</param>
/// <param name="XMm">Position in mm, to the right; NaN where the file gives none.</param>
/// <param name="YMm">Position in mm, upwards; NaN where the file gives none.</param>
/// <param name="Offset">Physical value of the number 0; 0 where the file gives none.</param>
public sealed record RecordedChannel(string Label, string Unit, double Conversion, double XMm, double YMm, double Offset = 0);
