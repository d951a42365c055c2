namespace LiveWave.Pipeline;

/// <summary>A table of a sheet as it was written, before it is checked: the bridge from a file format to <see cref="SheetForm"/>.</summary>
/// <param name="line">Line of its heading, from 1; for the whole sheet 1.</param>
public sealed class ParsedTable(int line)
{
    private readonly Dictionary<string, ParsedValue> _entries = new(StringComparer.Ordinal);

    /// <summary>Line of its heading, from 1.</summary>
    public int Line { get; } = line;

    /// <summary>What stands in it, by key.</summary>
    public IReadOnlyDictionary<string, ParsedValue> Entries => _entries;

    /// <summary>Enters a value.</summary>
    /// <param name="key">Its key, without dots having a meaning.</param>
    /// <param name="value">The value.</param>
    /// <returns>False where the key is there already; nothing is changed then.</returns>
    public bool TryAdd(string key, ParsedValue value) => _entries.TryAdd(key, value);
}
