using System.Collections;

namespace LiveWave.Pipeline.Tests;

/// <summary>Finds in the model what a key of the sheet became: property names are the keys', lists their plural.</summary>
internal static class SheetModel
{
    private static readonly Dictionary<string, string> Plurals = new(StringComparer.Ordinal)
    {
        ["cue"] = "Cues",
        ["patch"] = "Patches",
        ["band"] = "Bands",
        ["band.wave"] = "Waves",
        ["rule"] = "Rules",
        ["part"] = "Parts",
        ["output"] = "Outputs",
    };

    /// <summary>The property that belongs to a key.</summary>
    public static string Property(SheetKey key) =>
        Plurals.GetValueOrDefault(key.Path) ?? char.ToUpperInvariant(key.Name[0]) + key.Name[1..];

    /// <summary>What stands in the model for a key; in lists, in the first.</summary>
    public static object? Value(SessionSheet sheet, string path)
    {
        object? value = sheet;
        var at = "";
        foreach (var name in path.Split('.'))
        {
            at = at.Length == 0 ? name : at + "." + name;
            if (value is IEnumerable list) value = list.Cast<object>().First();
            var property = value!.GetType().GetProperty(Property(SheetKeys.Find(at)!));
            Assert.True(property is not null, $"the model has no place for '{at}'");
            value = property.GetValue(value);
        }

        return value;
    }
}
