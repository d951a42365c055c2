namespace LiveWave.Pipeline;

/// <summary>How often and how long garbage collection had stopped the process by an instant.</summary>
/// <param name="Collections">Collections of every generation.</param>
/// <param name="PauseSeconds">Pauses in all.</param>
internal readonly record struct PauseMark(int Collections, double PauseSeconds)
{
    /// <summary>Until now. Any thread; does not allocate.</summary>
    internal static PauseMark Now() => new(GC.CollectionCount(0), GC.GetTotalPauseDuration().TotalSeconds);
}
