namespace LiveWave.Pipeline;

/// <summary>The key table: every table and key that a session sheet may have. It drives checking and the reference text, so that neither
/// can know a key that the other does not.</summary>
public static partial class SheetKeys
{
    /// <summary>Every row, a table before its keys, in the order in which the reference shows them.</summary>
    public static IReadOnlyList<SheetKey> All { get; } =
    [
        .. SessionKeys(), .. StreamKeys(), .. AmplifierKeys(), .. CueKeys(),
        .. PatchKeys(), .. ConditioningKeys(), .. BandKeys(), .. WaveKeys(), .. EventKeys(),
        .. RuleKeys(), .. PartKeys(), .. LimitsKeys(), .. OutputKeys(), .. BudgetKeys(), .. RecordKeys(),
    ];

    /// <summary>The same rows, to look up.</summary>
    public static KeyTable Lookup { get; } = new(All, "sheet");

    /// <summary>The row of a key.</summary>
    /// <param name="path">Tables and key, with dots.</param>
    /// <returns>Null where the key is not known.</returns>
    public static SheetKey? Find(string path) => Lookup.Find(path);

    /// <summary>The rows of a table's own keys.</summary>
    /// <param name="tablePath">The table's path; empty for the tables of the sheet itself.</param>
    public static IEnumerable<SheetKey> Under(string tablePath) => Lookup.Under(tablePath);

    /// <summary>The path of a key in a table.</summary>
    internal static string Join(string tablePath, string name) => KeyTable.Join(tablePath, name);
}
