namespace LiveWave.Abstractions;

/// <summary>The only type the host looks for in a plug-in's assembly.</summary>
public interface IPlugin
{
    /// <summary>Says what the plug-in offers.</summary>
    /// <param name="catalog">Where to say it.</param>
    void Register(IPluginCatalog catalog);
}
