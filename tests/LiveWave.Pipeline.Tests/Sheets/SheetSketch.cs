namespace LiveWave.Pipeline.Tests;

/// <summary>A sheet as nested dictionaries, easy to damage, that becomes a <see cref="ParsedTable"/> in which every value has a line of
/// its own. Lists of tables have one table.</summary>
internal sealed class SheetSketch
{
    private readonly Dictionary<string, object?> _sheet = [];
    private readonly Dictionary<string, int> _lines = new(StringComparer.Ordinal);
    private int _line;

    /// <summary>A sheet that gives every key that is built, none of them its default where there is a choice.</summary>
    public static SheetSketch Full() => Of(key => key.IsBuilt);

    /// <summary>A sheet that gives what it must and no more.</summary>
    public static SheetSketch Least() =>
        Of(key => key.IsBuilt && (key.IsRequired || key.Path == "stream.file") && !key.Path.StartsWith("limits", StringComparison.Ordinal));

    /// <summary>What a key gets in <see cref="Full"/>: each something else, so that none is read in another's place.</summary>
    public static object Sample(SheetKey key) => key.Path switch
    {
        "patch.name" or "rule.patch" => "quill",
        "band.name" or "rule.band" => "beta",
        "output.name" => "lamp",
        "rule.wave" => "planar",
        "rule.outputs" => new[] { "lamp" },
        "stream.rateHz" => 500.0,
        "stream.channels" => 60L,
        "patch.badChannels" => new[] { "r2c2" },
        "band.lowHz" => 14.0,
        "band.highHz" => 22.0,
        "limits.pulsesPerMinute" => 3L,
        "limits.oldestDataMs" => 50.0,
        "conditioning.mainsHz" => 60.0,
        "conditioning.analysisRateHz" => 250.0,
        "patch.axes" => new Dictionary<string, object?> { ["anterior"] = 10L, ["left"] = 100.5 },
        "output.options" => new Dictionary<string, object?> { ["widthMs"] = 2L, ["line"] = "a", ["inverted"] = true },
        _ => SampleOf(key),
    };

    /// <summary>Gives a key a value, in the table where it belongs.</summary>
    public SheetSketch With(string path, object? content)
    {
        Open(path[..Math.Max(0, path.LastIndexOf('.'))])[path[(path.LastIndexOf('.') + 1)..]] = content;
        return this;
    }

    /// <summary>Takes a key away.</summary>
    public SheetSketch Without(string path)
    {
        _ = Open(path[..Math.Max(0, path.LastIndexOf('.'))]).Remove(path[(path.LastIndexOf('.') + 1)..]);
        return this;
    }

    /// <summary>Line of a key or table, once parsed.</summary>
    public int LineOf(string path) => _lines[path];

    /// <summary>As a file format's reader would hand it over.</summary>
    public ParsedTable Parsed()
    {
        _line = 1;
        _lines[""] = 1;
        return Parsed(_sheet, "", _line);
    }

    private static object SampleOf(SheetKey key) => key.Type switch
    {
        SheetKeyType.Name => $"first {key.TablePath}",
        SheetKeyType.Text when key.Words.Count > 0 => key.Words[^1],
        SheetKeyType.Text => $"some {key.Name}",
        SheetKeyType.Texts => new[] { "r1c1", "r2c2" },
        SheetKeyType.Whole => (long)key.Low + 6,
        SheetKeyType.Flag => true,
        _ => (double.IsFinite(key.Low) ? key.Low : 0) + (key.High <= 1 ? 0.25 : 17.5 + 0.01 * Array.IndexOf([.. SheetKeys.All], key)),
    };

    private static SheetSketch Of(Func<SheetKey, bool> isWanted)
    {
        var sketch = new SheetSketch();
        foreach (var key in SheetKeys.All.Where(key => isWanted(key) && !key.IsTable && IsOpen(key, isWanted)))
        {
            _ = sketch.With(key.Path, Sample(key));
        }

        return sketch;
    }

    /// <summary>A needed key in a table that itself isn't wanted stays away.</summary>
    private static bool IsOpen(SheetKey key, Func<SheetKey, bool> isWanted) =>
        key.TablePath.Length == 0 || isWanted(SheetKeys.Find(key.TablePath)!) || key.Path == "stream.file";

    private Dictionary<string, object?> Open(string path)
    {
        var table = _sheet;
        var at = "";
        foreach (var name in path.Split('.', StringSplitOptions.RemoveEmptyEntries))
        {
            at = at.Length == 0 ? name : at + "." + name;
            if (!table.TryGetValue(name, out var found))
            {
                var fresh = new Dictionary<string, object?>();
                found = SheetKeys.Find(at)?.Type == SheetKeyType.Tables ? new[] { fresh } : fresh;
                table[name] = found;
            }

            table = found as Dictionary<string, object?> ?? ((Dictionary<string, object?>[])found!)[0];
        }

        return table;
    }

    private ParsedTable Parsed(Dictionary<string, object?> table, string path, int line)
    {
        var parsed = new ParsedTable(line);
        foreach (var (name, content) in table)
        {
            var at = path.Length == 0 ? name : path + "." + name;
            var own = ++_line;
            _lines[at] = own;
            Assert.True(parsed.TryAdd(name, new(own, Content(content, at, own))));
        }

        return parsed;
    }

    private object? Content(object? content, string path, int line) => content switch
    {
        Dictionary<string, object?> table => Parsed(table, path, line),
        Array list => list.Cast<object?>().Select(item => new ParsedValue(line, Content(item, path, line))).ToArray(),
        _ => content,
    };
}
