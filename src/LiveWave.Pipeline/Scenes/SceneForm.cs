using System.Diagnostics.CodeAnalysis;
using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>Turns a parsed scene into the model, or says everything that is wrong with it.</summary>
public static class SceneForm
{
    /// <summary>Checks and reads a scene.</summary>
    /// <param name="parsed">The scene as it was written.</param>
    /// <param name="electrodes">Reads a table of positions: its path as the scene gives it, and the unit.</param>
    /// <param name="scene">The model; null where something is wrong.</param>
    /// <param name="faults">All that is wrong, by line; empty where nothing is.</param>
    /// <returns>Whether the scene can be played.</returns>
    public static bool TryRead(
        ParsedTable parsed,
        Func<string, string, IReadOnlyList<Electrode>> electrodes,
        [NotNullWhen(true)] out Scene? scene,
        out IReadOnlyList<SheetFault> faults)
    {
        ArgumentNullException.ThrowIfNull(parsed);
        ArgumentNullException.ThrowIfNull(electrodes);
        var found = new List<SheetFault>();
        var table = new SheetChecker(SceneKeys.Lookup, found).Check(parsed, path: "");
        new SceneCrossChecks(found).Check(table);
        scene = found.Count == 0 ? new SceneBuilder(electrodes).Build(table) : null;
        if (scene is not null && SceneCrossChecks.Channels(scene, table) is { } fault)
        {
            found.Add(fault);
            scene = null;
        }

        faults = [.. found.OrderBy(one => one.Line)];
        return scene is not null;
    }
}
