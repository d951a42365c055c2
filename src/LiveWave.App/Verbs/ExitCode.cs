namespace LiveWave.App;

/// <summary>What the program says to its caller.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>It ran, and the answer is no.</summary>
    public const int No = 1;

    /// <summary>The request or its input was wrong.</summary>
    public const int Refused = 2;

    /// <summary>The machine or rig failed.</summary>
    public const int Failed = 3;
}
