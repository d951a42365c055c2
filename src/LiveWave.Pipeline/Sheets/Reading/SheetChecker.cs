namespace LiveWave.Pipeline;

/// <summary>Holds a parsed sheet against the key table: keys unknown, not built or missing, types, ranges, words.</summary>
internal sealed class SheetChecker(KeyTable keys, List<SheetFault> faults)
{
    /// <summary>Checks a table and everything in it.</summary>
    /// <param name="parsed">As it was written.</param>
    /// <param name="path">Its path in the key table; empty for the sheet.</param>
    public CheckedTable Check(ParsedTable parsed, string path)
    {
        var table = new CheckedTable(path, parsed.Line);
        foreach (var (name, value) in parsed.Entries)
        {
            table.Note(name, value.Line);
            RefuseStrange(path, name, value);
        }

        foreach (var key in keys.Under(path))
        {
            if (!key.IsBuilt) continue;
            var content = parsed.Entries.TryGetValue(key.Name, out var value) ? Convert(key, value) : Absent(key, parsed.Line);
            if (content is not null) table.Set(key.Name, content);
        }

        return table;
    }

    private void RefuseStrange(string tablePath, string name, ParsedValue value)
    {
        var path = KeyTable.Join(tablePath, SheetValues.Plain(name));
        if (keys.Find(path) is { } key)
        {
            if (key.IsBuilt) return;
            faults.Add(new(value.Line, path, $"not yet built ({Uncapitalised(key.Meaning)})", "leave it out"));
            return;
        }

        var own = keys.Under(tablePath).ToArray();
        var elsewhere = keys.All.FirstOrDefault(k => k.Name == name);
        var hint = Spelling.Hint(name, own.Select(k => k.Name));
        if (hint.Length == 0 && elsewhere is not null) hint = $"it belongs to {Home(elsewhere)}; ";
        var headings = own.Where(k => k.IsBuilt).Select(k => tablePath.Length == 0 ? k.Heading : k.Name);
        var what = value.Content is ParsedTable or IReadOnlyList<ParsedValue> ? "unknown table" : "unknown key";
        faults.Add(new(value.Line, path, what, hint + "allowed: " + string.Join(", ", headings)));
    }

    private object? Absent(SheetKey key, int tableLine)
    {
        if (key.IsRequired)
        {
            faults.Add(new(tableLine, key.Path, "missing", Advice(key)));
            return null;
        }

        if (key.Type != SheetKeyType.Table) return key.Default;

        // A table of defaults counts as written; one that has needed keys (limits) is there or it is not.
        return keys.Under(key.Path).Any(k => k.IsRequired) ? null : Check(new ParsedTable(tableLine), key.Path);
    }

    private object? Convert(SheetKey key, ParsedValue value) => (key.Type, value.Content) switch
    {
        (SheetKeyType.Table, ParsedTable inner) => Check(inner, key.Path),
        (SheetKeyType.Table, IReadOnlyList<ParsedValue>) =>
            Refuse(key, value, "it is a list of tables", $"there is one: write it as [{key.Path}]"),
        (SheetKeyType.Tables, IReadOnlyList<ParsedValue> list) => CheckAll(key, value, list),
        (SheetKeyType.Tables, ParsedTable) =>
            Refuse(key, value, "it is a single table", $"there may be several: write it as [[{key.Path}]]"),
        (SheetKeyType.Name, string name) => SheetValues.IsName(name) ? name : Refuse(key, value, $"{SheetValues.Quoted(name)} is no name"),
        (SheetKeyType.Text, string text) => CheckText(key, value, text),
        (SheetKeyType.Texts, IReadOnlyList<ParsedValue> list) => CheckTexts(key, value, list),
        (SheetKeyType.Number, long number) => CheckNumber(key, value, number),
        (SheetKeyType.Number, double number) => CheckNumber(key, value, number),
        (SheetKeyType.Whole, long whole) =>
            SheetValues.IsInRange(key, whole) ? whole : Refuse(key, value, $"it is {SheetValues.Written(whole)}"),
        (SheetKeyType.Whole, double number) => Refuse(key, value, $"it is {SheetValues.Written(number)}"),
        (SheetKeyType.Flag, bool flag) => flag,
        (SheetKeyType.NamedNumbers or SheetKeyType.Options, ParsedTable entries) => CheckEntries(key, entries),
        _ => Refuse(key, value, $"it is {value.Described}"),
    };

    private CheckedTable[]? CheckAll(SheetKey key, ParsedValue value, IReadOnlyList<ParsedValue> list)
    {
        if (key.IsRequired && list.Count == 0) _ = Refuse(key, value, "it is empty");
        var tables = new List<CheckedTable>(list.Count);
        foreach (var item in list)
        {
            if (item.Content is ParsedTable inner) tables.Add(Check(inner, key.Path));
            else _ = Refuse(key, item, $"{item.Described} stands in it");
        }

        return tables.Count == list.Count ? [.. tables] : null;
    }

    private object? CheckText(SheetKey key, ParsedValue value, string text)
    {
        if (key.Words.Count > 0)
        {
            if (key.Words.Contains(text, StringComparer.Ordinal)) return text;
            if (key.WordsNotYet.Contains(text, StringComparer.Ordinal)) return Refuse(key, value, $"'{text}' is not yet built");
            var hint = Spelling.Hint(text, key.Words.Concat(key.WordsNotYet));
            return Refuse(key, value, $"{SheetValues.Quoted(text)} is not known", hint + Advice(key));
        }

        // Only what may be empty (notes) may have several lines; the rest are names and paths of others.
        if (key.Default is "") return text;
        if (text.Length == 0) return Refuse(key, value, "it is empty", key.IsRequired ? "give a text" : "give a text, or leave it out");
        return text.Any(char.IsControl) ? Refuse(key, value, "it holds a control character") : text;
    }

    private string[]? CheckTexts(SheetKey key, ParsedValue value, IReadOnlyList<ParsedValue> list)
    {
        var texts = new List<string>(list.Count);
        foreach (var item in list)
        {
            if (item.Content is not string text) _ = Refuse(key, item, $"{item.Described} stands in it");
            else if (text.Length == 0 || text.Any(char.IsControl)) _ = Refuse(key, item, $"{SheetValues.Quoted(text)} stands in it");
            else if (texts.Contains(text, StringComparer.Ordinal)) _ = Refuse(key, item, $"{SheetValues.Quoted(text)} stands in it twice");
            else texts.Add(text);
        }

        return texts.Count == list.Count ? [.. texts] : null;
    }

    private object? CheckNumber(SheetKey key, ParsedValue value, double number)
    {
        if (key.Words.Count > 0)
        {
            return key.Words.Contains(SheetValues.Written(number), StringComparer.Ordinal)
                ? number
                : Refuse(key, value, $"it is {SheetValues.Written(number)}");
        }

        return SheetValues.IsInRange(key, number) ? number : Refuse(key, value, $"it is {SheetValues.Written(number)}");
    }

    private Dictionary<string, object>? CheckEntries(SheetKey key, ParsedTable entries)
    {
        var wanted = key.Type == SheetKeyType.NamedNumbers;
        var found = new Dictionary<string, object>(StringComparer.Ordinal);
        foreach (var (name, value) in entries.Entries)
        {
            var content = value.Content is long whole ? (double)whole : value.Content;
            var isRight = content is double number ? SheetValues.IsInRange(key, number) : !wanted && content is string or bool;
            if (content is not null && isRight && SheetValues.IsName(name))
            {
                found.Add(name, content);
                continue;
            }

            var what = isRight ? "its key is no name" : $"it is {value.Described}{SheetValues.Shown(content)}";
            faults.Add(new(value.Line, KeyTable.Join(key.Path, SheetValues.Plain(name)), what, Advice(key)));
        }

        return found.Count == entries.Entries.Count ? found : null;
    }

    private object? Refuse(SheetKey key, ParsedValue value, string what, string? advice = null)
    {
        faults.Add(new(value.Line, key.Path, what, advice ?? Advice(key)));
        return null;
    }

    private static string Advice(SheetKey key) => "give " + key.Takes;

    private string Home(SheetKey key) =>
        key.TablePath.Length == 0 ? $"the {keys.FileWord} itself, as {key.Heading}" : keys.Find(key.TablePath)?.Heading ?? key.TablePath;

    private static string Uncapitalised(string meaning) => char.ToLowerInvariant(meaning[0]) + meaning[1..];
}
