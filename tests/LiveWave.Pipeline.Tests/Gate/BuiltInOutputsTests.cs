using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class BuiltInOutputsTests
{
    [Fact]
    public void They_are_made_by_name()
    {
        var catalog = new Catalog();
        new BuiltInOutputs().Register(catalog);
        var options = new PluginOptions("sheet.toml, line 9", new Dictionary<string, object> { ["keptPulses"] = 2.0 }, new VirtualClock());

        Assert.Equal(["memory", "none"], catalog.Made.Keys.Order(StringComparer.Ordinal));
        Assert.IsType<NoOutput>(catalog.Made["none"](options)).Dispose();
        Assert.IsType<MemoryOutput>(catalog.Made["memory"](options)).Dispose();
        options.RefuseUnknown();
    }

    [Fact]
    public void The_memory_keeps_the_latest_pulses_and_when_they_came()
    {
        var clock = new VirtualClock(1);
        using var output = new MemoryOutput(clock, keptPulses: 2);
        output.Open();
        for (var number = 1; number <= 3; number++)
        {
            clock.MoveTo(number);
            var pulse = new Pulse { Decision = number };
            output.Send(in pulse);
        }

        output.Quiet();

        Assert.Equal(3, output.SentCount);
        Assert.Equal([(2, 2.0), (3, 3.0)], output.Kept().Select(kept => (kept.Pulse.Decision, kept.AtSeconds)));
    }

    [Fact]
    public void Once_disposed_they_take_nothing()
    {
        var memory = new MemoryOutput(new VirtualClock());
        var none = new NoOutput();
        memory.Dispose();
        none.Dispose();
        var pulse = default(Pulse);

        Assert.Throws<ObjectDisposedException>(() => memory.Send(in pulse));
        Assert.Throws<ObjectDisposedException>(() => none.Send(in pulse));
        Assert.Throws<ObjectDisposedException>(memory.Open);
        Assert.Throws<ObjectDisposedException>(none.Open);
        Assert.Empty(memory.Kept());
    }

    private sealed class Catalog : IPluginCatalog
    {
        public Dictionary<string, Func<PluginOptions, object>> Made { get; } = [];

        public void Add<TContract>(string name, Func<PluginOptions, TContract> make)
            where TContract : class => Made.Add(name, make);
    }
}
