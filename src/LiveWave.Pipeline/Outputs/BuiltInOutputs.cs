using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The outputs that come with the program and need no device: <c>none</c> and <c>memory</c>.</summary>
public sealed class BuiltInOutputs : IPlugin
{
    /// <inheritdoc/>
    public void Register(IPluginCatalog catalog)
    {
        ArgumentNullException.ThrowIfNull(catalog);
        catalog.Add<IOutput>("none", _ => new NoOutput());
        catalog.Add<IOutput>("memory", options => new MemoryOutput(options.Clock, (int)options.Number("keptPulses", 1000, 1, 1_000_000)));
    }
}
