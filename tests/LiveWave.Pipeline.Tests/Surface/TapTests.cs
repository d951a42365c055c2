using System.Reactive.Linq;

namespace LiveWave.Pipeline.Tests;

public sealed class TapTests
{
    private readonly List<string> _reports = [];

    [Fact]
    public void A_throwing_observer_is_cut_off_and_the_others_go_on()
    {
        var tap = Tap();
        var heard = new List<int>();
        using var bad = tap.Subscribe(value => throw new InvalidOperationException($"no {value}"));
        using var good = tap.Subscribe(heard.Add);

        tap.Tell(1);
        tap.Tell(2);

        Assert.Equal([1, 2], heard);
        Assert.Contains("no 1", Assert.Single(_reports), StringComparison.Ordinal);
    }

    [Fact]
    public void Operators_of_the_reactive_library_compose_on_it()
    {
        var tap = Tap();
        var heard = new List<int>();
        using var subscription = tap.Where(value => value % 2 == 0).Select(value => value * 10).Subscribe(heard.Add);

        for (var i = 0; i < 5; i++) tap.Tell(i);

        Assert.Equal([0, 20, 40], heard);
    }

    [Fact]
    public void Who_unsubscribed_hears_no_more()
    {
        var tap = Tap();
        var heard = new List<int>();
        var subscription = tap.Subscribe(heard.Add);
        tap.Tell(1);

        subscription.Dispose();
        tap.Tell(2);

        Assert.Equal([1], heard);
        Assert.False(tap.HasObservers);
    }

    [Fact]
    public void The_end_is_told_once_also_to_those_who_come_late()
    {
        var tap = Tap();
        var ends = 0;
        using var early = tap.Subscribe(_ => { }, () => ends++);

        tap.Complete();
        using var late = tap.Subscribe(_ => { }, () => ends++);

        Assert.Equal(2, ends);
    }

    [Fact]
    public void Telling_allocates_nothing()
    {
        var tap = Tap();
        var sum = 0L;
        using var subscription = tap.Subscribe(value => sum += value);
        tap.Tell(1);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 1000; i++) tap.Tell(i);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
        Assert.Equal(499501, sum);
    }

    private Tap<int> Tap() => new("numbers", (what, error) => _reports.Add($"{what}: {error.Message}"));
}
