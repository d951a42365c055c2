namespace LiveWave.Abstractions;

/// <summary>Takes what a plug-in offers.</summary>
public interface IPluginCatalog
{
    /// <summary>Offers an implementation of a contract.</summary>
    /// <typeparam name="TContract">A contract, or an observer such as <c>IObserver&lt;Verdict&gt;</c>.</typeparam>
    /// <param name="name">As a sheet will call it, e.g. <c>slow-wave-front</c>.</param>
    /// <param name="make">Makes one, from the options in the sheet.</param>
    void Add<TContract>(string name, Func<PluginOptions, TContract> make)
        where TContract : class;
}
