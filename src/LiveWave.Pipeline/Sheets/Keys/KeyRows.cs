namespace LiveWave.Pipeline;

/// <summary>Short words for writing key tables.</summary>
internal static class KeyRows
{
    public static SheetKey Table(string path, string meaning, string otherwise = "defaults", bool required = false) =>
        new(path, SheetKeyType.Table, meaning) { IsRequired = required, Otherwise = required ? "" : otherwise };

    public static SheetKey Tables(string path, string meaning, string otherwise = "none", bool required = false) =>
        new(path, SheetKeyType.Tables, meaning) { IsRequired = required, Otherwise = required ? "" : otherwise };

    public static SheetKey Name(string path, string meaning) => new(path, SheetKeyType.Name, meaning) { IsRequired = true };

    public static SheetKey Reference(string path, string meaning) => new(path, SheetKeyType.Text, meaning) { IsRequired = true };

    public static SheetKey Text(string path, string meaning, string? usual = null, string otherwise = "") =>
        new(path, SheetKeyType.Text, meaning) { Default = usual, Otherwise = otherwise };

    public static SheetKey Word(
        string path, string meaning, ReadOnlySpan<string> words, string? usual = null, ReadOnlySpan<string> notYet = default) =>
        new(path, SheetKeyType.Text, meaning)
        {
            Words = words.ToArray(),
            WordsNotYet = notYet.ToArray(),
            Default = usual,
            IsRequired = usual is null,
        };

    public static SheetKey Texts(string path, string meaning, string otherwise = "none") =>
        new(path, SheetKeyType.Texts, meaning) { Otherwise = otherwise };

    public static SheetKey Number(
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

    public static SheetKey Whole(
        string path, string meaning, long? usual = null, string otherwise = "", double low = 1, double high = double.PositiveInfinity) =>
        new(path, SheetKeyType.Whole, meaning)
        {
            Default = usual,
            Otherwise = otherwise,
            IsRequired = usual is null && otherwise.Length == 0,
            Low = low,
            High = high,
        };

    public static SheetKey Flag(string path, string meaning, bool usual) =>
        new(path, SheetKeyType.Flag, meaning) { Default = usual };

    /// <summary>A key that is agreed on and not built: known to the reference, refused by the check.</summary>
    public static SheetKey NotYet(string path, SheetKeyType type, string meaning, string unit = "") =>
        new(path, type, meaning) { IsBuilt = false, Unit = unit };
}
