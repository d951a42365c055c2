namespace LiveWave.Recordings;

/// <summary>What kinds of recordings are read.</summary>
internal enum RecordingKind
{
    /// <summary>XDF 1.0.</summary>
    Xdf,

    /// <summary>EDF or EDF+: numbers of 16 bits.</summary>
    Edf,

    /// <summary>BDF or BDF+: numbers of 24 bits.</summary>
    Bdf,
}
