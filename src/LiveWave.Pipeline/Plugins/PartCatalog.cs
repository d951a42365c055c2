using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What can be named in a sheet: built-in parts, and those of plug-ins.</summary>
public sealed class PartCatalog : IPluginCatalog
{
    private readonly Dictionary<(Type Contract, string Name), Func<PluginOptions, object>> _parts = [];

    /// <inheritdoc/>
    /// <exception cref="RefusedException">The name is taken for this contract.</exception>
    public void Add<TContract>(string name, Func<PluginOptions, TContract> make)
        where TContract : class
    {
        if (!_parts.TryAdd((typeof(TContract), name), make))
        {
            throw new RefusedException($"two parts are called '{name}'", typeof(TContract).Name, "rename one of them");
        }
    }

    /// <summary>The names offered for a contract, in order.</summary>
    /// <typeparam name="TContract">The contract.</typeparam>
    public IReadOnlyList<string> Names<TContract>()
        where TContract : class =>
        [.. _parts.Keys.Where(key => key.Contract == typeof(TContract)).Select(key => key.Name).Order(StringComparer.Ordinal)];

    /// <summary>Makes a part and refuses options it did not ask for.</summary>
    /// <typeparam name="TContract">The contract.</typeparam>
    /// <param name="name">As the sheet calls it.</param>
    /// <param name="options">The sheet's options.</param>
    /// <exception cref="RefusedException">No such part, or an option is wrong.</exception>
    public TContract Make<TContract>(string name, PluginOptions options)
        where TContract : class
    {
        ArgumentNullException.ThrowIfNull(options);
        if (!_parts.TryGetValue((typeof(TContract), name), out var make))
        {
            throw new RefusedException($"nothing is called '{name}'", options.Where, "allowed: " + string.Join(", ", Names<TContract>()));
        }

        var part = (TContract)make(options);
        options.RefuseUnknown();
        return part;
    }
}
