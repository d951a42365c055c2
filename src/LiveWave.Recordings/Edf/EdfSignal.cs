namespace LiveWave.Recordings;

/// <summary>One signal of an EDF header.</summary>
/// <param name="Number">Its place in the file, from 1.</param>
/// <param name="Label">Its name.</param>
/// <param name="Unit">Unit of the physical value; may be empty.</param>
/// <param name="Scaling">Physical units per number, and physical value of the number 0.</param>
/// <param name="SamplesPerRecord">0 or more.</param>
/// <param name="OffsetInRecord">First byte of its samples from the beginning of a data record.</param>
/// <param name="IsAnnotations">Its samples are text.</param>
/// <param name="Problem">Why its numbers mean nothing; empty if they do.</param>
internal sealed record EdfSignal(
    int Number,
    string Label,
    string Unit,
    (double Scale, double Offset) Scaling,
    int SamplesPerRecord,
    long OffsetInRecord,
    bool IsAnnotations,
    string Problem);
