namespace LiveWave.Display;

/// <summary>How a cell stands out without colour.</summary>
[Flags]
internal enum CellStyle : byte
{
    /// <summary>It does not.</summary>
    Plain = 0,

    /// <summary>Bold.</summary>
    Bold = 1,

    /// <summary>Ink and ground exchanged.</summary>
    Reversed = 2,
}
