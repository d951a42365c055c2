using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display.Tests;

public sealed class ScreenTests
{
    [Theory]
    [InlineData(80, 24)]
    [InlineData(120, 40)]
    public void A_session_looks_as_approved(int columns, int rows)
    {
        var folder = Path.Combine(AppContext.BaseDirectory, "Approved");
        var name = $"session-{columns}x{rows}";
        var actual = Drawn(columns, rows, ScriptedSession.Play()).Text();

        var path = Path.Combine(folder, $"{name}.approved.txt");
        var approved = File.Exists(path) ? File.ReadAllText(path).ReplaceLineEndings("\n") : "";

        if (approved == actual) return;
        Directory.CreateDirectory(folder);
        var received = Path.Combine(folder, $"{name}.received.txt");
        File.WriteAllText(received, actual);
        Assert.Fail($"the screen differs from the approved one; if that is meant, copy {received} over Approved/{name}.approved.txt");
    }

    [Theory]
    [InlineData(80, 24)]
    [InlineData(100, 30)]
    [InlineData(120, 40)]
    [InlineData(200, 60)]
    public void At_every_size_the_essential_is_there_uncut(int columns, int rows)
    {
        var text = Drawn(columns, rows, ScriptedSession.Play()).Text();

        foreach (var part in (string[])["REHEARSAL", "ARRAY", "TIDE", "ROSE", "VERDICTS", "BUDGET", "of 200", "↖ 135° ± 2.5°", "due → sent", "limit\n", "calibrated"])
        {
            Assert.Contains(part, text, StringComparison.Ordinal);
        }

        Assert.DoesNotContain('…', text[text.IndexOf('\n', StringComparison.Ordinal)..]);   // only the stream's name gives way
    }

    [Theory]
    [InlineData(79, 24)]
    [InlineData(80, 23)]
    [InlineData(12, 3)]
    public void Too_small_a_screen_says_so_in_one_line(int columns, int rows)
    {
        var lines = Drawn(columns, rows, ScriptedSession.Play()).Text().TrimEnd('\n').Split('\n');

        Assert.StartsWith("needs more", lines[0], StringComparison.Ordinal);
        Assert.All(lines.Skip(1), line => Assert.Empty(line));
    }

    [Fact]
    public void Before_the_first_row_nothing_is_claimed()
    {
        var text = Drawn(80, 24, new SessionPicture(ScriptedSession.Facts)).Text();

        Assert.Contains("no row yet", text, StringComparison.Ordinal);
        Assert.Contains("DISARMED", text, StringComparison.Ordinal);
        Assert.Contains("none yet", text, StringComparison.Ordinal);
        Assert.Contains("n/a", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Armed_is_not_a_hue_the_line_turns_dark_on_light_with_a_hatched_edge()
    {
        var picture = ScriptedSession.Play();
        var rehearsal = Drawn(80, 24, picture);
        picture.Gate = new GateGlance(GateState.Armed, 2, "");

        var armed = Drawn(80, 24, picture);

        Assert.Contains("ARMED", armed.Text(), StringComparison.Ordinal);
        Assert.DoesNotContain("REHEARSAL", armed.Text(), StringComparison.Ordinal);
        for (var x = 0; x < 80; x++)
        {
            Assert.Equal(CellStyle.Plain, rehearsal[x, 0].Style & CellStyle.Reversed);
            Assert.Equal(CellStyle.Reversed, armed[x, 0].Style & CellStyle.Reversed);
            Assert.Equal((Slate.Strong, Slate.Ground), (armed[x, 0].Ink, armed[x, 0].Ground));
        }

        Assert.Equal("▞▞", $"{armed[0, 0].Glyph}{armed[79, 0].Glyph}");
    }

    [Fact]
    public void A_fault_is_shown_until_the_end_and_no_warning_hides_it()
    {
        var picture = ScriptedSession.Play();
        picture.Take(new Status(StatusLevel.Fault, "output 'laser'", "failed", "", 5001));

        picture.Take(new Status(StatusLevel.Warning, "feed", "was slow", "", 5002));

        Assert.Contains("! output 'laser': failed", Drawn(80, 24, picture).Text(), StringComparison.Ordinal);
    }

    [Fact]
    public void Evidence_stands_above_the_first_row_exactly_when_it_is_over_the_threshold()
    {
        Assert.Equal(0, TidePanel.Height(double.NegativeInfinity, 3));
        Assert.InRange(TidePanel.Height(-0.01, 3), 0.9, 0.9999);
        Assert.Equal(1, TidePanel.Height(0, 3));
        Assert.InRange(TidePanel.Height(0.01, 3), 1.0001, 1.1);
        Assert.Equal(3, TidePanel.Height(1e6, 3));
    }

    private static CellGrid Drawn(int columns, int rows, SessionPicture picture)
    {
        var grid = new CellGrid(columns, rows);
        new Screen(ColourDepth.Full).Draw(grid, picture);
        return grid;
    }
}
