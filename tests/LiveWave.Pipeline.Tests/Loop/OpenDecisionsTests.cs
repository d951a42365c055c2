using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class OpenDecisionsTests
{
    [Fact]
    public void However_many_decisions_are_open_each_finds_its_outcomes_and_no_more()
    {
        var open = new OpenDecisions();
        for (var number = 1; number <= 1000; number++) open.Add(new Decision { Number = number }, outcomes: 2);

        Assert.All(Enumerable.Range(1, 1000), number => Assert.Equal([true, true, false], [Joins(open, number), Joins(open, number), Joins(open, number)]));
    }

    [Fact]
    public void Places_of_decisions_whose_outcomes_came_are_used_again()
    {
        var open = new OpenDecisions();
        for (var number = 1; number <= 300; number++)
        {
            open.Add(new Decision { Number = number }, outcomes: 1);
            Assert.True(Joins(open, number));
        }

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var number = 301; number <= 900; number++)
        {
            open.Add(new Decision { Number = number }, outcomes: 1);
            _ = Joins(open, number);
        }

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    private static bool Joins(OpenDecisions open, long number) => open.TryJoin(new Outcome { Decision = number }, out _);
}
