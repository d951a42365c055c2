using System.Text;
using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>One kind of TOML file that people write: reading its text, and refusing what is wrong with it.</summary>
/// <param name="what">What such a file is called: <c>session sheet</c>.</param>
/// <param name="shortly">The same with its article, in short: <c>the sheet</c>.</param>
/// <param name="advice">Which file to give.</param>
internal sealed class TomlFile(string what, string shortly, string advice)
{
    /// <summary>Larger files are none: somebody gave the recording.</summary>
    private const int MostBytes = 1_000_000;

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>All that is wrong in a file as one exception; see <see cref="SheetReader"/>.</summary>
    public static RefusedException Refusal(string path, IReadOnlyList<SheetFault> faults)
    {
        var refusals = faults.Select(fault => new RefusedException(fault.What, Where(path, fault), fault.Advice)).ToArray();
        return refusals.Length == 1
            ? refusals[0]
            : new RefusedException(string.Join('\n', refusals.Select(refusal => refusal.Message)), where: "", advice: "");
    }

    /// <summary>The text of a file.</summary>
    /// <exception cref="RefusedException">It can't be read, or is no text.</exception>
    public string TextOf(string path)
    {
        if (Directory.Exists(path)) throw new RefusedException("it is a folder", path, advice);
        try
        {
            using var file = File.OpenRead(path);
            if (file.Length > MostBytes) throw new RefusedException($"it is too large for a {what}", path, advice);

            using var reader = new StreamReader(file, StrictUtf8);
            return reader.ReadToEnd();
        }
        catch (DecoderFallbackException e)
        {
            throw new RefusedException("it is not UTF-8 text", path, advice, e);
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new RefusedException("there is no such file", path, $"give the path of a {what}", e);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException or ArgumentException or NotSupportedException)
        {
            throw new RefusedException($"{shortly} can't be read", path, e.Message, e);
        }
    }

    private static string Where(string path, SheetFault fault) =>
        fault.Key.Length == 0 ? $"{path}:{fault.Line}" : $"{path}:{fault.Line}: {fault.Key}";
}
