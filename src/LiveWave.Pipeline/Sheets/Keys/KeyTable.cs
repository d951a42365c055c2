namespace LiveWave.Pipeline;

/// <summary>A key table, to look up: every table and key that one kind of file may have.</summary>
public sealed class KeyTable
{
    private readonly Dictionary<string, SheetKey> _byPath;
    private readonly ILookup<string, SheetKey> _byTable;

    /// <summary>Takes the rows.</summary>
    /// <param name="all">Every row, a table before its keys.</param>
    /// <param name="fileWord">What such a file is called in messages: <c>sheet</c>.</param>
    internal KeyTable(IReadOnlyList<SheetKey> all, string fileWord)
    {
        All = all;
        FileWord = fileWord;
        _byPath = all.ToDictionary(key => key.Path, StringComparer.Ordinal);
        _byTable = all.ToLookup(key => key.TablePath, StringComparer.Ordinal);
    }

    /// <summary>Every row, a table before its keys, in the order in which a reference shows them.</summary>
    public IReadOnlyList<SheetKey> All { get; }

    /// <summary>What such a file is called in messages.</summary>
    public string FileWord { get; }

    /// <summary>The row of a key.</summary>
    /// <param name="path">Tables and key, with dots.</param>
    /// <returns>Null where the key is not known.</returns>
    public SheetKey? Find(string path) => _byPath.GetValueOrDefault(path);

    /// <summary>The rows of a table's own keys.</summary>
    /// <param name="tablePath">The table's path; empty for the tables of the file itself.</param>
    public IEnumerable<SheetKey> Under(string tablePath) => _byTable[tablePath];

    /// <summary>The path of a key in a table.</summary>
    internal static string Join(string tablePath, string name) => tablePath.Length == 0 ? name : tablePath + "." + name;
}
