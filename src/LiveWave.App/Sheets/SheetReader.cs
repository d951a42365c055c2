using System.Text;
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
    /// <summary>Larger files are no sheets: somebody gave the recording.</summary>
    private const int MostBytes = 1_000_000;

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Reads a sheet.</summary>
    /// <param name="path">Its file. A patch without calibration gets the one beside the sheet, if that is there.</param>
    /// <exception cref="RefusedException">It can't be read, or something in it is wrong.</exception>
    public static SessionSheet Read(string path)
    {
        var sheet = Parse(TextOf(path), path);
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
        throw Refusal(path, faults);
    }

    private static RefusedException Refusal(string path, IReadOnlyList<SheetFault> faults)
    {
        var refusals = faults.Select(fault => new RefusedException(fault.What, Where(path, fault), fault.Advice)).ToArray();
        return refusals.Length == 1
            ? refusals[0]
            : new RefusedException(string.Join('\n', refusals.Select(refusal => refusal.Message)), where: "", advice: "");
    }

    private static string Where(string path, SheetFault fault) =>
        fault.Key.Length == 0 ? $"{path}:{fault.Line}" : $"{path}:{fault.Line}: {fault.Key}";

    private static string TextOf(string path)
    {
        if (Directory.Exists(path)) throw new RefusedException("it is a folder", path, "give the .toml file that describes the run");
        try
        {
            using var file = File.OpenRead(path);
            if (file.Length > MostBytes)
            {
                throw new RefusedException("it is too large for a session sheet", path, "give the .toml file that describes the run");
            }

            using var reader = new StreamReader(file, StrictUtf8);
            return reader.ReadToEnd();
        }
        catch (DecoderFallbackException e)
        {
            throw new RefusedException("it is not UTF-8 text", path, "give the .toml file that describes the run", e);
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new RefusedException("there is no such file", path, "give the path of a session sheet", e);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw new RefusedException("the sheet can't be read", path, e.Message, e);
        }
    }
}
