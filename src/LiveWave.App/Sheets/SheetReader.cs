using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Reads session sheets from TOML files.</summary>
/// <remarks>What is wrong comes as one <see cref="RefusedException"/>. With one fault its parts are that fault's (where: file, line, key).
/// With several its message has a line for each, in the sheet's order, each <c>file:line: key: what; what is allowed</c>; they stand in
/// <see cref="RefusedException.What"/>, and where and advice are empty. When the TOML itself is broken only that is reported: what the
/// rest means can't be known then.</remarks>
internal static class SheetReader
{
    private static readonly TomlFile Kind = new("session sheet", "the sheet", "give the .toml file that describes the run");

    /// <summary>Reads a sheet.</summary>
    /// <param name="path">Its file. A patch without calibration gets the one beside the sheet, if that is there.</param>
    /// <exception cref="RefusedException">It can't be read, or something in it is wrong.</exception>
    public static SessionSheet Read(string path)
    {
        var sheet = Parse(Kind.TextOf(path), path);
        if (!File.Exists(sheet.PathOf(sheet.CalibrationBeside))) return sheet;
        return sheet with
        {
            Patches = [.. sheet.Patches.Select(patch => patch with { Calibration = patch.Calibration ?? sheet.CalibrationBeside })],
        };
    }

    /// <summary>Reads a sheet from its text; looks at no file.</summary>
    /// <param name="text">TOML.</param>
    /// <param name="path">Where it comes from, for messages; paths in it are relative to its folder.</param>
    /// <exception cref="RefusedException">Something in it is wrong.</exception>
    public static SessionSheet Parse(string text, string path)
    {
        var parsed = TomlTables.Parse(text, out var faults);
        if (faults.Count == 0 && SheetForm.TryRead(parsed, path, out var sheet, out faults)) return sheet;
        throw TomlFile.Refusal(path, faults);
    }
}
