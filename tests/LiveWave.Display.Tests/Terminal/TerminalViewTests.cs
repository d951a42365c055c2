using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display.Tests;

public sealed class TerminalViewTests
{
    [Fact]
    public void A_run_is_drawn_while_it_goes_on_and_the_terminal_is_given_back()
    {
        using var run = new SmallRun();
        var terminal = new FakeTerminal();
        var screen = new VirtualScreen(80, 24);
        var view = run.View(terminal);

        for (var turn = 0; run.Loop.RunOnce(); turn++)
        {
            if (turn % 10 == 0) view.Look();
        }

        view.Look();
        foreach (var text in terminal.Written) screen.Write(text);
        view.Dispose();

        Assert.Contains("REHEARSAL", screen.Row(0), StringComparison.Ordinal);
        Assert.Contains("array 20 ch 500 Hz", screen.Row(0), StringComparison.Ordinal);
        Assert.Contains("towards", screen.Row(3), StringComparison.Ordinal);
        Assert.DoesNotContain("0 waves", screen.Row(2), StringComparison.Ordinal);
        Assert.EndsWith("12.0 s", screen.Row(19), StringComparison.Ordinal);
        Assert.True(terminal.IsDisposed);
    }

    [Fact]
    public void A_watched_run_decides_what_an_unwatched_one_does()
    {
        using var watched = new SmallRun();
        using var alone = new SmallRun();
        using var view = watched.View(new FakeTerminal());

        while (watched.Loop.RunOnce()) view.Look();
        while (alone.Loop.RunOnce())
        {
        }

        Assert.NotEmpty(alone.Decisions);
        Assert.Equal(alone.Decisions, watched.Decisions);
    }

    [Fact]
    public void Another_size_is_followed_with_the_next_look()
    {
        using var run = new SmallRun();
        var terminal = new FakeTerminal();
        using var view = run.View(terminal);
        view.Look();

        terminal.Extent = (100, 30);
        view.Look();

        var screen = new VirtualScreen(100, 30);
        screen.Write(terminal.Written[^1]);
        Assert.StartsWith(" TIDE", screen.Row(24), StringComparison.Ordinal);
    }

    [Fact]
    public void Without_colours_no_colour_is_asked_for()
    {
        using var run = new SmallRun();
        var terminal = new FakeTerminal { Colours = ColourDepth.None };
        using var view = run.View(terminal);

        while (run.Loop.RunOnce()) view.Look();

        Assert.All(terminal.Written, text => Assert.DoesNotMatch(@"\e\[0?(;[17])*;?([349][0-9]|10[0-7])[;m]", text));
    }

    [Fact]
    public void Paper_gets_lines_and_no_control_sequence()
    {
        using var run = new SmallRun();
        var terminal = new FakeTerminal { IsScreen = false, Colours = ColourDepth.None };
        using var view = run.View(terminal);

        while (run.Loop.RunOnce()) view.Look();
        view.Look();

        var text = string.Concat(terminal.Written);
        Assert.StartsWith("REHEARSAL: array, 20 channels, 500 Hz, not calibrated\n", text, StringComparison.Ordinal);
        Assert.Contains(" planar wave 1 towards ", text, StringComparison.Ordinal);
        Assert.Contains("rule towards, wave 1: ", text, StringComparison.Ordinal);
        Assert.DoesNotContain('\e', text);
    }

    [Fact]
    public void What_runs_on_the_decision_thread_allocates_nothing()
    {
        using var run = new SmallRun();
        using var view = run.View(new FakeTerminal());
        for (var turn = 0; turn < 150; turn++) run.Loop.RunOnce();
        view.Look();

        var before = run.Ledger.DecisionThreadBytes + GC.GetAllocatedBytesForCurrentThread();
        run.Surface.Readings.Tell(new Reading { Patch = "", Band = "", Estimator = "" });
        run.Surface.Events.Tell(default);
        run.Surface.Verdicts.Tell(default);
        run.Surface.Status.Tell(default);
        run.Surface.Blocks.Tell(run.Block);
        var allocated = run.Ledger.DecisionThreadBytes + GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }

    [Fact]
    public void What_did_not_fit_is_counted_and_shown()
    {
        using var run = new SmallRun();
        var terminal = new FakeTerminal { Extent = (120, 40) };
        using var view = run.View(terminal);
        for (var i = 0; i < 8192 + 5; i++) run.Surface.Readings.Tell(new Reading());

        view.Look();

        var screen = new VirtualScreen(120, 40);
        screen.Write(terminal.Written[^1]);
        Assert.Contains("view missed 5", screen.Row(31), StringComparison.Ordinal);
    }

    [Fact]
    public void A_terminal_that_fails_ends_the_view_and_not_the_run()
    {
        using var run = new SmallRun();
        var view = run.View(new BrokenTerminal());

        view.Start();
        while (run.Loop.RunOnce())
        {
        }

        view.Dispose();

        Assert.IsType<InvalidOperationException>(view.Failure);
        Assert.Equal(RunEnd.Ended, run.Loop.End);
    }

    private sealed class BrokenTerminal : ITerminal
    {
        public ColourDepth Colours => ColourDepth.None;

        public bool IsScreen => true;

        public (int Columns, int Rows) Size() => throw new InvalidOperationException("gone");

        public void Write(ReadOnlySpan<char> text) => throw new InvalidOperationException("gone");

        public void Dispose()
        {
        }
    }
}
