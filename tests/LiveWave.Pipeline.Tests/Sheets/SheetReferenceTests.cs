namespace LiveWave.Pipeline.Tests;

/// <summary>The reference as people read it.</summary>
public sealed class SheetReferenceTests
{
    [Fact]
    public void Is_the_approved_one()
    {
        var folder = Path.Combine(AppContext.BaseDirectory, "Sheets");
        var approved = File.ReadAllText(Path.Combine(folder, "reference.approved.txt")).ReplaceLineEndings("\n");

        var actual = SheetReference.Text();

        if (approved == actual) return;
        var received = Path.Combine(folder, "reference.received.txt");
        File.WriteAllText(received, actual);
        Assert.Fail($"the reference differs from the approved one; if that is meant, copy {received} over Sheets/reference.approved.txt");
    }

    [Fact]
    public void Mentions_every_key_in_its_section_once()
    {
        var found = new List<string>();
        var table = "";
        foreach (var line in SheetReference.Text().Split('\n'))
        {
            if (line.StartsWith('[')) found.Add(table = line.Split(' ')[0].Trim('[', ']'));
            else if (line.StartsWith("  ", StringComparison.Ordinal) && line[2] != ' ') found.Add($"{table}.{line.Split(' ', StringSplitOptions.RemoveEmptyEntries)[0]}");
        }

        Assert.Equal(SheetKeys.All.Select(key => key.Path), found);
    }

    [Fact]
    public void Lines_fit_a_wide_screen()
    {
        Assert.All(SheetReference.Text().Split('\n'), line => Assert.InRange(line.Length, 0, 150));
    }
}
