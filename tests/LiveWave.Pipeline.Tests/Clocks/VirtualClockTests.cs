namespace LiveWave.Pipeline.Tests;

public sealed class VirtualClockTests
{
    [Fact]
    public void It_stands_still_until_it_is_moved_and_never_goes_back()
    {
        var clock = new VirtualClock(10);

        Assert.Equal(10, clock.NowSeconds);
        clock.MoveTo(12);
        Assert.Equal(12, clock.NowSeconds);
        clock.MoveTo(11);
        Assert.Equal(12, clock.NowSeconds);
    }

    [Fact]
    public void Whoever_waits_is_freed_by_the_move_that_reaches_the_instant()
    {
        var clock = new VirtualClock();
        var freedAt = double.NaN;
        var thread = new Thread(() =>
        {
            clock.WaitUntil(2);
            freedAt = clock.NowSeconds;
        });
        thread.Start();

        clock.MoveTo(1);
        clock.MoveTo(2);
        thread.Join();

        Assert.Equal(2, freedAt);
    }

    [Fact]
    public void An_instant_that_has_come_is_not_waited_for()
    {
        var clock = new VirtualClock(3);

        clock.WaitUntil(3);
        clock.WaitUntil(double.NaN);
    }

    [Fact]
    public void Closing_frees_all_who_wait_now_and_later()
    {
        var clock = new VirtualClock();
        var thread = new Thread(() => clock.WaitUntil(1));
        thread.Start();

        clock.Close();
        thread.Join();
        clock.WaitUntil(2);

        Assert.Equal(0, clock.NowSeconds);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void It_stands_at_finite_times_only(double seconds)
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new VirtualClock(seconds));
        Assert.Throws<ArgumentOutOfRangeException>(() => new VirtualClock().MoveTo(seconds));
    }
}
