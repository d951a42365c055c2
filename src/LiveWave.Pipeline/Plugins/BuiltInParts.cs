namespace LiveWave.Pipeline;

/// <summary>Everything that comes with the program, by its plain name.</summary>
public static class BuiltInParts
{
    /// <summary>A new catalog that holds all of it.</summary>
    public static PartCatalog Catalog()
    {
        var catalog = new PartCatalog();
        new BuiltInEstimators().Register(catalog);
        new BuiltInOutputs().Register(catalog);
        return catalog;
    }
}
