namespace LiveWave.Abstractions;

/// <summary>The options that a sheet gives to an estimator, conditioner, output or observer.</summary>
public sealed class PluginOptions
{
    private readonly IReadOnlyDictionary<string, object> _values;
    private readonly HashSet<string> _asked = new(StringComparer.Ordinal);

    /// <summary>Wraps a table of the sheet.</summary>
    /// <param name="where">Where the table stands, for messages: file, line, table.</param>
    /// <param name="values">Keys with a <see cref="double"/>, <see cref="bool"/> or <see cref="string"/> each.</param>
    /// <param name="clock">The run's clock.</param>
    public PluginOptions(string where, IReadOnlyDictionary<string, object> values, IClock clock)
    {
        ArgumentNullException.ThrowIfNull(values);
        Where = where;
        _values = values;
        Clock = clock;
    }

    /// <summary>Where the table stands, for messages.</summary>
    public string Where { get; }

    /// <summary>The run's clock.</summary>
    public IClock Clock { get; }

    /// <summary>A number.</summary>
    /// <param name="key">Its key, which ends in its unit.</param>
    /// <param name="otherwise">Where the sheet does not say.</param>
    /// <param name="low">Least value allowed.</param>
    /// <param name="high">Largest value allowed.</param>
    /// <exception cref="RefusedException">It is not a number, or not between the limits.</exception>
    public double Number(string key, double otherwise, double low = double.NegativeInfinity, double high = double.PositiveInfinity)
    {
        var value = Value(key, otherwise);
        return value >= low && value <= high
            ? value
            : throw new RefusedException($"'{key}' is {value}", Where, $"give a number from {low} to {high}");
    }

    /// <summary>A word.</summary>
    /// <param name="key">Its key.</param>
    /// <param name="otherwise">Where the sheet does not say.</param>
    /// <exception cref="RefusedException">It is not a text.</exception>
    public string Text(string key, string otherwise) => Value(key, otherwise);

    /// <summary>A yes or no.</summary>
    /// <param name="key">Its key.</param>
    /// <param name="otherwise">Where the sheet does not say.</param>
    /// <exception cref="RefusedException">It is neither true nor false.</exception>
    public bool Flag(string key, bool otherwise) => Value(key, otherwise);

    /// <summary>Host: refuses keys that nobody asked for, after the part was made.</summary>
    /// <exception cref="RefusedException">A key is not known.</exception>
    public void RefuseUnknown()
    {
        foreach (var key in _values.Keys)
        {
            if (_asked.Contains(key)) continue;
            var allowed = _asked.Count == 0 ? "it takes no options" : "allowed: " + string.Join(", ", _asked.Order(StringComparer.Ordinal));
            throw new RefusedException($"unknown key '{key}'", Where, allowed);
        }
    }

    private T Value<T>(string key, T otherwise)
    {
        _ = _asked.Add(key);
        if (!_values.TryGetValue(key, out var value)) return otherwise;
        if (value is T typed) return typed;
        var wanted = typeof(T) == typeof(double) ? "a number" : typeof(T) == typeof(bool) ? "true or false" : "a text";
        throw new RefusedException($"'{key}' has the wrong type", Where, $"give {wanted}");
    }
}
