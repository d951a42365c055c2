using System.Diagnostics;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The machine's monotonic clock, in seconds, on an origin of choice.</summary>
/// <remarks>Any thread; does not allocate. <see cref="WaitUntil"/> sleeps to shortly before the instant and spins the rest.</remarks>
public sealed class RealClock : IClock
{
    // The kernel takes a long sleep in one; the bound keeps the sum of ticks away from overflow for an instant that is
    // infinitely far.
    private const double LongestSleepSeconds = 3600;

    private readonly ICoarseWait _wait;
    private readonly double _spinSeconds;
    private readonly long _originTicks;
    private readonly double _originSeconds;

    /// <summary>Makes a clock that counts from the machine's own origin, as LSL's local clock does.</summary>
    public RealClock()
        : this(ForThisPlatform(), originTicks: 0, originSeconds: 0)
    {
    }

    /// <summary>Makes a clock on which it is a given time now: a run on a file lives in the file's own stamps.</summary>
    /// <param name="nowIs">What the clock reads now, seconds; finite.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="nowIs"/> is not finite.</exception>
    public RealClock(double nowIs)
        : this(ForThisPlatform(), Ticks(), nowIs)
    {
    }

    internal RealClock(ICoarseWait wait, long originTicks, double originSeconds)
    {
        if (!double.IsFinite(originSeconds))
            throw new ArgumentOutOfRangeException(nameof(originSeconds), originSeconds, "a clock needs a finite time to begin with");
        _wait = wait;
        _spinSeconds = wait.SpinSeconds;
        _originTicks = originTicks;
        _originSeconds = originSeconds;
    }

    /// <summary>What precise waiting lacks on this platform, in one sentence to show at start; empty where it lacks nothing.</summary>
    public string Lacks => _wait.Lacks;

    /// <inheritdoc/>
    public double NowSeconds => At(Ticks());

    /// <inheritdoc/>
    /// <remarks>Returns at once for NaN.</remarks>
    public void WaitUntil(double instantSeconds)
    {
        while (true)
        {
            var ticks = Ticks();
            var sleepSeconds = instantSeconds - At(ticks) - _spinSeconds;
            if (!(sleepSeconds > 0)) break;
            _wait.Sleep(ticks, ticks + (long)(Math.Min(sleepSeconds, LongestSleepSeconds) * Stopwatch.Frequency));
        }

        while (NowSeconds < instantSeconds) Thread.SpinWait(10);
    }

    private double At(long ticks) => _originSeconds + ((ticks - _originTicks) / (double)Stopwatch.Frequency);

#pragma warning disable RS0030 // this is the clock that everything else is asked to use
    private static long Ticks() => Stopwatch.GetTimestamp();
#pragma warning restore RS0030

    private static ICoarseWait ForThisPlatform() =>
        OperatingSystem.IsLinux() && Environment.Is64BitProcess && Stopwatch.Frequency == 1_000_000_000
            ? new LinuxWait()
            : new PortableWait();
}
