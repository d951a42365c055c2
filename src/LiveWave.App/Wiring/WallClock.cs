namespace LiveWave.App;

/// <summary>The one place that takes the machine's wall clock; it names sessions and dates them, and decides nothing.</summary>
internal static class WallClock
{
#pragma warning disable RS0030 // the ban says 'passed in by App': this is App
    public static TimeProvider Time { get; } = TimeProvider.System;
#pragma warning restore RS0030
}
