namespace LiveWave.Display;

/// <summary>How many colours a terminal shows.</summary>
public enum ColourDepth
{
    /// <summary>None: shapes and bold only.</summary>
    None,

    /// <summary>Sixteen, whose looks are the terminal's own choice.</summary>
    Sixteen,

    /// <summary>256: a cube of 6 × 6 × 6 and 24 greys.</summary>
    TwoHundredFiftySix,

    /// <summary>16.7 million.</summary>
    Full,
}
