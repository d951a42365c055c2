using System.Globalization;
using System.Text;

namespace LiveWave.Pipeline;

/// <summary>The key table as people read it: in <c>--help</c> and in the README.</summary>
public static class SheetReference
{
    private const int KeyWidth = 28;
    private const int TakesWidth = 38;
    private const int UsualWidth = 26;
    private const int MeaningWidth = 52;

    /// <summary>The whole reference as plain text: a section for each table, in it a line for each key with what it takes, what counts
    /// where the sheet says nothing, and what it means.</summary>
    public static string Text() => Text(SheetKeys.Lookup);

    /// <summary>The reference of any key table.</summary>
    /// <param name="keys">The table.</param>
    public static string Text(KeyTable keys)
    {
        ArgumentNullException.ThrowIfNull(keys);
        var text = new StringBuilder();
        AppendRow(text, "key", "takes", "if absent", "meaning");
        foreach (var key in keys.All)
        {
            if (key.IsTable) AppendHeading(text, key);
            else AppendRow(text, "  " + key.Name, Takes(key), Usual(key), key.Meaning);
        }

        return text.ToString();
    }

    private static void AppendHeading(StringBuilder text, SheetKey table)
    {
        var several = table.Type == SheetKeyType.Tables ? table.IsRequired ? "one or more" : "any number" : "";
        _ = text.Append('\n');
        AppendRow(text, table.Heading, table.IsBuilt ? several : "not yet", Usual(table), table.Meaning);
    }

    private static string Takes(SheetKey key)
    {
        if (!key.IsBuilt) return "not yet";
        var takes = key.Type == SheetKeyType.Name ? "a name" : key.Takes;
        return key.WordsNotYet.Count == 0 ? takes : $"{takes}; not yet: {string.Join(", ", key.WordsNotYet)}";
    }

    private static string Usual(SheetKey key) => key switch
    {
        { IsBuilt: false } => "",
        { IsRequired: true } => "required",
        { Default: null } => key.Otherwise,
        { Default: "" } => "empty",
        { Default: bool flag } => flag ? "true" : "false",
        _ => Convert.ToString(key.Default, CultureInfo.InvariantCulture) ?? "",
    };

    private static void AppendRow(StringBuilder text, string key, string takes, string usual, string meaning)
    {
        string[][] cells = [Wrap(key, KeyWidth), Wrap(takes, TakesWidth), Wrap(usual, UsualWidth), Wrap(meaning, MeaningWidth)];
        int[] widths = [KeyWidth, TakesWidth, UsualWidth, 0];
        for (var row = 0; row < cells.Max(cell => cell.Length); row++)
        {
            var line = new StringBuilder();
            for (var column = 0; column < cells.Length; column++)
            {
                var cell = row < cells[column].Length ? cells[column][row] : "";
                _ = line.Append(cell.PadRight(widths[column])).Append("  ");
            }

            _ = text.Append(line.ToString().TrimEnd()).Append('\n');
        }
    }

    /// <summary>Breaks a text at spaces; a longer word stays whole. Spaces at its start stay.</summary>
    private static string[] Wrap(string text, int width)
    {
        var lines = new List<string>();
        var rest = text;
        while (rest.Length > width)
        {
            var end = rest.LastIndexOf(' ', width);
            if (end <= 0 || rest[..end].TrimStart().Length == 0) break;
            lines.Add(rest[..end]);
            rest = rest[(end + 1)..];
        }

        lines.Add(rest);
        return [.. lines];
    }
}
