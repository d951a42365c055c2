namespace LiveWave.Pipeline;

/// <summary>A table whose keys are known and whose values are of the right type and in range, defaults filled in. What was missing or
/// wrong reads as null, NaN or empty, and has been reported.</summary>
internal sealed class CheckedTable(string path, int line)
{
    private readonly Dictionary<string, object> _values = new(StringComparer.Ordinal);
    private readonly Dictionary<string, int> _lines = new(StringComparer.Ordinal);

    /// <summary>Its path in the key table.</summary>
    public string Path { get; } = path;

    /// <summary>Line of its heading.</summary>
    public int Line { get; } = line;

    /// <summary>The keys that the sheet itself gives, right or wrong.</summary>
    public bool Wrote(string name) => _lines.ContainsKey(name);

    /// <summary>Line of a key; of the table where the sheet does not give it.</summary>
    public int LineOf(string name) => _lines.GetValueOrDefault(name, Line);

    /// <summary>Notes that the sheet gives a key.</summary>
    public void Note(string name, int atLine) => _lines[name] = atLine;

    /// <summary>Enters a checked value.</summary>
    public void Set(string name, object value) => _values[name] = value;

    /// <summary>A text.</summary>
    public string? Text(string name) => Get<string>(name);

    /// <summary>A number, or NaN.</summary>
    public double Number(string name) => _values.TryGetValue(name, out var value) && value is double number ? number : double.NaN;

    /// <summary>A whole number.</summary>
    public long? Whole(string name) => _values.TryGetValue(name, out var value) && value is long whole ? whole : null;

    /// <summary>True or false.</summary>
    public bool Flag(string name) => _values.TryGetValue(name, out var value) && value is true;

    /// <summary>A list of texts.</summary>
    public IReadOnlyList<string> Texts(string name) => Get<string[]>(name) ?? [];

    /// <summary>A table.</summary>
    public CheckedTable? Table(string name) => Get<CheckedTable>(name);

    /// <summary>Tables.</summary>
    public IReadOnlyList<CheckedTable> Tables(string name) => Get<CheckedTable[]>(name) ?? [];

    /// <summary>Names with a number each, or a plug-in's options.</summary>
    public IReadOnlyDictionary<string, object> Entries(string name) =>
        Get<Dictionary<string, object>>(name) ?? new Dictionary<string, object>(StringComparer.Ordinal);

    private T? Get<T>(string name)
        where T : class => _values.TryGetValue(name, out var value) ? value as T : null;
}
