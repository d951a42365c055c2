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

    private static readonly Dictionary<string, SheetKey> ByPath = All.ToDictionary(key => key.Path, StringComparer.Ordinal);

    private static readonly ILookup<string, SheetKey> ByTable = All.ToLookup(key => key.TablePath, StringComparer.Ordinal);

    /// <summary>The row of a key.</summary>
    /// <param name="path">Tables and key, with dots.</param>
    /// <returns>Null where the key is not known.</returns>
    public static SheetKey? Find(string path) => ByPath.GetValueOrDefault(path);

    /// <summary>The rows of a table's own keys.</summary>
    /// <param name="tablePath">The table's path; empty for the tables of the sheet itself.</param>
    public static IEnumerable<SheetKey> Under(string tablePath) => ByTable[tablePath];

    /// <summary>The path of a key in a table.</summary>
    internal static string Join(string tablePath, string name) => tablePath.Length == 0 ? name : tablePath + "." + name;

    private static SheetKey Table(string path, string meaning, string otherwise = "defaults", bool required = false) =>
        new(path, SheetKeyType.Table, meaning) { IsRequired = required, Otherwise = required ? "" : otherwise };

    private static SheetKey Tables(string path, string meaning, string otherwise = "none", bool required = false) =>
        new(path, SheetKeyType.Tables, meaning) { IsRequired = required, Otherwise = required ? "" : otherwise };

    private static SheetKey Name(string path, string meaning) => new(path, SheetKeyType.Name, meaning) { IsRequired = true };

    private static SheetKey Reference(string path, string meaning) => new(path, SheetKeyType.Text, meaning) { IsRequired = true };

    private static SheetKey Text(string path, string meaning, string? usual = null, string otherwise = "") =>
        new(path, SheetKeyType.Text, meaning) { Default = usual, Otherwise = otherwise };

    private static SheetKey Word(
        string path, string meaning, ReadOnlySpan<string> words, string? usual = null, ReadOnlySpan<string> notYet = default) =>
        new(path, SheetKeyType.Text, meaning)
        {
            Words = words.ToArray(),
            WordsNotYet = notYet.ToArray(),
            Default = usual,
            IsRequired = usual is null,
        };

    private static SheetKey Texts(string path, string meaning, string otherwise = "none") =>
        new(path, SheetKeyType.Texts, meaning) { Otherwise = otherwise };

    private static SheetKey Number(
        string path, string unit, string meaning, double? usual = null, string otherwise = "",
        double low = double.NegativeInfinity, double high = double.PositiveInfinity, bool above = false) =>
        new(path, SheetKeyType.Number, meaning)
        {
            Unit = unit,
            Default = usual,
            Otherwise = otherwise,
            IsRequired = usual is null && otherwise.Length == 0,
            Low = low,
            High = high,
            IsLowExcluded = above,
        };

    private static SheetKey Whole(
        string path, string meaning, long? usual = null, string otherwise = "", double low = 1, double high = double.PositiveInfinity) =>
        new(path, SheetKeyType.Whole, meaning)
        {
            Default = usual,
            Otherwise = otherwise,
            IsRequired = usual is null && otherwise.Length == 0,
            Low = low,
            High = high,
        };

    private static SheetKey Flag(string path, string meaning, bool usual) =>
        new(path, SheetKeyType.Flag, meaning) { Default = usual };

    /// <summary>A key that is agreed on and not built: known to the reference, refused by the check.</summary>
    private static SheetKey NotYet(string path, SheetKeyType type, string meaning, string unit = "") =>
        new(path, type, meaning) { IsBuilt = false, Unit = unit };
}
