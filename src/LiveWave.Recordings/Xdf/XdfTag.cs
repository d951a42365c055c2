namespace LiveWave.Recordings;

/// <summary>Kinds of chunks of XDF 1.0.</summary>
internal enum XdfTag : ushort
{
    FileHeader = 1,
    StreamHeader = 2,
    Samples = 3,
    ClockOffset = 4,
    Boundary = 5,
    StreamFooter = 6,
}
