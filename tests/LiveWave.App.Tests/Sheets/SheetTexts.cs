namespace LiveWave.App.Tests;

/// <summary>Sheets as text, to be damaged.</summary>
internal static class SheetTexts
{
    /// <summary>The bundled example.</summary>
    public static string Millrace { get; } = File.ReadAllText(MillracePath);

    /// <summary>Its file, beside the program.</summary>
    public static string MillracePath => Path.Combine(AppContext.BaseDirectory, "replay-data", "millrace.sheet.toml");

    /// <summary>A short sheet in which everything that has a default is left out.</summary>
    public static string Short { get; } =
        """
        [session]
        name = "short"

        [stream]
        file = "short.xdf"

        [[patch]]
        name = "quill"
        electrodes = "electrodes.tsv"

        [[band]]
        name = "beta"
        lowHz = 14
        highHz = 22
        [[band.wave]]
        estimator = "planar"

        [[rule]]
        name = "any"
        patch = "quill"
        band = "beta"
        kind = "planar"
        """.ReplaceLineEndings("\n") + "\n";

    /// <summary><see cref="Short"/> with something else in the place of something.</summary>
    public static string ShortBut(string was, string becomes)
    {
        Assert.Contains(was, Short, StringComparison.Ordinal);
        return Short.Replace(was, becomes, StringComparison.Ordinal);
    }
}
