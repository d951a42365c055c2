using System.Diagnostics;

namespace LiveWave.Pipeline.Tests;

public sealed class RealClockTests
{
    [Fact]
    public void Waiting_never_returns_before_the_instant()
    {
        var clock = new RealClock();
        for (var aheadMicroseconds = 0; aheadMicroseconds <= 2000; aheadMicroseconds += 125)
        {
            var instant = clock.NowSeconds + (aheadMicroseconds * 1e-6);

            clock.WaitUntil(instant);

            Assert.True(clock.NowSeconds >= instant);
        }
    }

    [Fact]
    public void The_portable_wait_never_returns_before_the_instant_either()
    {
        using var wait = new PortableWait();
        var clock = new RealClock(wait, originTicks: 0, originSeconds: 0);
        var instant = clock.NowSeconds + 0.018;   // long enough that it sleeps before it spins

        clock.WaitUntil(instant);

        Assert.True(clock.NowSeconds >= instant);
    }

    [Fact]
    public void An_instant_that_has_passed_or_is_not_known_is_not_waited_for()
    {
        var clock = new RealClock();

        clock.WaitUntil(clock.NowSeconds - 1);
        clock.WaitUntil(double.NegativeInfinity);
        clock.WaitUntil(double.NaN);
    }

    [Fact]
    public void A_clock_can_live_in_the_time_of_a_file()
    {
        var machine = new RealClock();
        var before = machine.NowSeconds;
        var clock = new RealClock(nowIs: 5000);

        var first = clock.NowSeconds;
        var second = clock.NowSeconds;

        Assert.InRange(first, 5000, 5000 + (machine.NowSeconds - before) + 1e-6);
        Assert.True(second >= first);
    }

    [Fact]
    public void Without_an_origin_it_counts_as_the_machine_does()
    {
        var clock = new RealClock();
#pragma warning disable RS0030 // what it is compared with
        var before = Stopwatch.GetTimestamp() / (double)Stopwatch.Frequency;
        var now = clock.NowSeconds;
        var after = Stopwatch.GetTimestamp() / (double)Stopwatch.Frequency;
#pragma warning restore RS0030

        Assert.InRange(now, before, after);
    }

    [Fact]
    public void A_clock_can_not_begin_at_no_time()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new RealClock(double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => new RealClock(double.PositiveInfinity));
    }

    [Fact]
    public void What_a_platform_lacks_is_said_in_words()
    {
        using var portable = new PortableWait();

        Assert.Contains("late", portable.Lacks, StringComparison.Ordinal);
        if (OperatingSystem.IsLinux()) Assert.Equal("", new RealClock().Lacks);
    }

    [Fact]
    public void Reading_and_waiting_allocate_nothing()
    {
        var clock = new RealClock();
        for (var i = 0; i < 5; i++) clock.WaitUntil(clock.NowSeconds + 0.002);   // the first sleeps bind the native calls

        var before = GC.GetAllocatedBytesForCurrentThread();
        clock.WaitUntil(clock.NowSeconds + 0.0005);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }
}
