namespace LiveWave.Recordings;

/// <summary>Where one chunk lies in its file; all in bytes from the start of the file.</summary>
/// <param name="Start">First byte of its length field.</param>
/// <param name="Tag">What it is; may be a number that the standard doesn't know.</param>
/// <param name="Content">First byte behind the tag.</param>
/// <param name="DeclaredEnd">First byte behind it, as its length field says.</param>
/// <param name="End">The same, or the end of the file where the chunk is cut off.</param>
internal readonly record struct XdfChunk(long Start, XdfTag Tag, long Content, long DeclaredEnd, long End)
{
    /// <summary>The file ends inside the chunk.</summary>
    public bool IsCut => End != DeclaredEnd;
}
