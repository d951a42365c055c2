using System.Diagnostics.CodeAnalysis;

namespace LiveWave.Pipeline;

/// <summary>Turns a parsed sheet into the model, or says everything that is wrong with it.</summary>
public static class SheetForm
{
    /// <summary>Checks and reads a sheet. Allocates; for the start of a run.</summary>
    /// <param name="parsed">The sheet as it was written.</param>
    /// <param name="file">Its file, as it was asked for; for messages, and paths are relative to its folder.</param>
    /// <param name="sheet">The model; null where something is wrong.</param>
    /// <param name="faults">All that is wrong, by line; empty where nothing is.</param>
    /// <returns>Whether the sheet can be used.</returns>
    public static bool TryRead(
        ParsedTable parsed, string file, [NotNullWhen(true)] out SessionSheet? sheet, out IReadOnlyList<SheetFault> faults)
    {
        ArgumentNullException.ThrowIfNull(parsed);
        ArgumentNullException.ThrowIfNull(file);
        var found = new List<SheetFault>();
        var table = new SheetChecker(SheetKeys.Lookup, found).Check(parsed, path: "");
        new SheetCrossChecks(found).Check(table);
        sheet = found.Count == 0 ? new SheetBuilder(file).Build(table) : null;
        faults = [.. found.OrderBy(fault => fault.Line)];
        return sheet is not null;
    }
}
