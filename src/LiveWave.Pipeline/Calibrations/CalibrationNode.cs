using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>One value of a calibration file, with its place: whatever is wrong with it is said with file and JSON path.</summary>
internal readonly struct CalibrationNode
{
    private const int LongestShown = 80;

    private readonly JsonElement _value;
    private readonly string _file;
    private readonly string _path;

    /// <summary>The whole document.</summary>
    /// <param name="root">Its outermost value.</param>
    /// <param name="file">The file, as the user gave it.</param>
    public CalibrationNode(JsonElement root, string file)
        : this(root, file, "$")
    {
    }

    private CalibrationNode(JsonElement value, string file, string path)
    {
        _value = value;
        _file = file;
        _path = path;
    }

    /// <summary>Text from a file, fit for one line: no control characters, not long.</summary>
    /// <param name="text">Any text.</param>
    public static string Plain(string text)
    {
        var cut = text.Length > LongestShown ? string.Concat(text.AsSpan(0, LongestShown), "...") : text;
        return new string([.. cut.Select(letter => char.IsControl(letter) || letter is '\u2028' or '\u2029' ? '?' : letter)]);
    }

    /// <summary>Refuses this value.</summary>
    /// <param name="what">What is wrong.</param>
    /// <param name="advice">What to do.</param>
    /// <returns>To be thrown.</returns>
    public RefusedException Refusal(string what, string advice) => new(what, $"{_file}, {_path}", advice);

    /// <summary>Refuses keys that are not of the format: a misspelt one would silently leave out what it was meant to say.</summary>
    /// <param name="keys">All keys that may be here.</param>
    public void Knows(params string[] keys)
    {
        Require(JsonValueKind.Object, "an object");
        foreach (var property in _value.EnumerateObject())
        {
            if (keys.Contains(property.Name, StringComparer.Ordinal)) continue;
            throw Refusal($"key '{Plain(property.Name)}' is not known", "known here are " + string.Join(", ", keys));
        }
    }

    /// <summary>A value that must be there.</summary>
    /// <param name="key">Its key.</param>
    public CalibrationNode this[string key] =>
        Optional(key) ?? throw Refusal($"key '{key}' is missing", "make the calibration again");

    /// <summary>A value that may be absent or null.</summary>
    /// <param name="key">Its key.</param>
    public CalibrationNode? Optional(string key)
    {
        Require(JsonValueKind.Object, "an object");
        return _value.TryGetProperty(key, out var value) && value.ValueKind != JsonValueKind.Null
            ? new CalibrationNode(value, _file, $"{_path}.{key}")
            : null;
    }

    /// <summary>The values of a list.</summary>
    public CalibrationNode[] Items()
    {
        Require(JsonValueKind.Array, "a list");
        var items = new CalibrationNode[_value.GetArrayLength()];
        var i = 0;
        foreach (var value in _value.EnumerateArray())
        {
            items[i] = new CalibrationNode(value, _file, $"{_path}[{i}]");
            i++;
        }

        return items;
    }

    /// <summary>A text that is not empty.</summary>
    public string Text()
    {
        Require(JsonValueKind.String, "a text");
        var text = _value.GetString()!;
        return text.Length > 0 ? text : throw Refusal("the text is empty", "it names something");
    }

    /// <summary>A finite number within limits.</summary>
    /// <param name="least">Smallest allowed.</param>
    /// <param name="most">Largest allowed.</param>
    public double Number(double least = double.MinValue, double most = double.MaxValue)
    {
        Require(JsonValueKind.Number, "a number");
        if (!_value.TryGetDouble(out var number) || !double.IsFinite(number))
        {
            throw Refusal($"{Plain(_value.GetRawText())} is not a finite number", "numbers are finite and fit a double");
        }

        if (number >= least && number <= most) return number;
        throw Refusal(
            FormattableString.Invariant($"{number} is out of range"),
            most == double.MaxValue ? FormattableString.Invariant($"at least {least}") : FormattableString.Invariant($"from {least} to {most}"));
    }

    /// <summary>A finite number above 0.</summary>
    public double Positive()
    {
        var number = Number();
        return number > 0 ? number : throw Refusal(FormattableString.Invariant($"{number} is not above 0"), "a number above 0");
    }

    /// <summary>A whole number.</summary>
    /// <param name="least">Smallest allowed.</param>
    public int Whole(int least)
    {
        Require(JsonValueKind.Number, "a number");
        if (_value.TryGetInt32(out var number) && number >= least) return number;
        throw Refusal($"{Plain(_value.GetRawText())} is out of range", $"a whole number, at least {least}");
    }

    /// <summary>True or false.</summary>
    public bool Flag()
    {
        if (_value.ValueKind is JsonValueKind.True or JsonValueKind.False) return _value.GetBoolean();
        throw Refusal($"{Kind()} where true or false is expected", "write true or false");
    }

    /// <summary>An object as it stands in the file.</summary>
    public string Raw()
    {
        Require(JsonValueKind.Object, "an object");
        return _value.GetRawText();
    }

    private void Require(JsonValueKind kind, string expected)
    {
        if (_value.ValueKind == kind) return;
        throw Refusal($"{Kind()} where {expected} is expected", "make the calibration again");
    }

    private string Kind() => _value.ValueKind switch
    {
        JsonValueKind.Object => "an object",
        JsonValueKind.Array => "a list",
        JsonValueKind.String => "a text",
        JsonValueKind.Number => "a number",
        JsonValueKind.Null => "null",
        _ => "true or false",
    };
}
