using System.Globalization;
using LiveWave.Pipeline;
using Tomlyn.Syntax;

namespace LiveWave.App;

/// <summary>Builds nested tables out of TOML's flat list of headings and dotted keys.</summary>
/// <param name="root">The empty sheet; filled.</param>
internal sealed class TomlTree(ParsedTable root)
{
    private readonly List<SheetFault> _faults = [];

    /// <summary>Enters a document that was parsed and validated without errors.</summary>
    /// <returns>What is defined twice, should validation have let it through.</returns>
    public IReadOnlyList<SheetFault> Fill(DocumentSyntax document)
    {
        AddAll(root, document.KeyValues);
        foreach (var heading in document.Tables)
        {
            if (Open(heading) is { } table) AddAll(table, heading.Items);
        }

        return _faults;
    }

    private ParsedTable? Open(TableSyntaxBase heading)
    {
        if (heading.Name is null) return null;
        var names = NamesOf(heading.Name);
        var line = LineOf(heading);
        if (Descend(root, names.AsSpan(0, names.Length - 1), line) is not { } parent) return null;
        return heading is TableArraySyntax ? Append(parent, names[^1], line) : Enter(parent, names[^1], line);
    }

    private ParsedTable? Append(ParsedTable parent, string name, int line)
    {
        var table = new ParsedTable(line);
        _ = parent.TryAdd(name, new(line, new List<ParsedValue>()));
        if (parent.Entries[name].Content is not List<ParsedValue> list) return Refuse(name, line);
        list.Add(new(line, table));
        return table;
    }

    /// <summary>Steps into a table, made where it is not there; of a list of tables into the last.</summary>
    private ParsedTable? Enter(ParsedTable parent, string name, int line)
    {
        if (!parent.Entries.TryGetValue(name, out var found))
        {
            found = new(line, new ParsedTable(line));
            _ = parent.TryAdd(name, found);
        }

        return found.Content switch
        {
            ParsedTable table => table,
            List<ParsedValue> list when list.Count > 0 && list[^1].Content is ParsedTable last => last,
            _ => Refuse(name, line),
        };
    }

    private ParsedTable? Descend(ParsedTable from, ReadOnlySpan<string> names, int line)
    {
        var table = from;
        foreach (var name in names)
        {
            if (Enter(table, name, line) is not { } next) return null;
            table = next;
        }

        return table;
    }

    private void AddAll(ParsedTable table, IEnumerable<KeyValueSyntax> pairs)
    {
        foreach (var pair in pairs)
        {
            if (pair.Key is null || pair.Value is null) continue;
            var names = NamesOf(pair.Key);
            var line = LineOf(pair);
            if (Descend(table, names.AsSpan(0, names.Length - 1), line) is not { } parent) continue;
            if (!parent.TryAdd(names[^1], new(line, ContentOf(pair.Value)))) _ = Refuse(names[^1], line);
        }
    }

    private object? ContentOf(ValueSyntax value) => value switch
    {
        StringValueSyntax text => text.Value ?? "",
        IntegerValueSyntax whole => whole.Value,
        FloatValueSyntax number => number.Value,
        BooleanValueSyntax flag => flag.Value,
        ArraySyntax list => ListOf(list),
        InlineTableSyntax inline => TableOf(inline),
        _ => null,
    };

    private List<ParsedValue> ListOf(ArraySyntax list)
    {
        var items = new List<ParsedValue>();
        foreach (var item in list.Items)
        {
            if (item.Value is { } value) items.Add(new(LineOf(value), ContentOf(value)));
        }

        return items;
    }

    private ParsedTable TableOf(InlineTableSyntax inline)
    {
        var table = new ParsedTable(LineOf(inline));
        AddAll(table, inline.Items.Select(item => item.KeyValue).OfType<KeyValueSyntax>());
        return table;
    }

    private ParsedTable? Refuse(string name, int line)
    {
        _faults.Add(new(line, name, "it is defined twice", "keep one"));
        return null;
    }

    private static string[] NamesOf(KeySyntax key) =>
        [NameOf(key.Key), .. key.DotKeys.Select(item => NameOf(item.Key))];

    private static string NameOf(BareKeyOrStringValueSyntax? part) => part switch
    {
        StringValueSyntax text => text.Value ?? "",
        BareKeySyntax bare => bare.Key?.Text ?? "",
        _ => Convert.ToString(part, CultureInfo.InvariantCulture) ?? "",
    };

    private static int LineOf(SyntaxNode node) => node.Span.Start.Line + 1;
}
