using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>Reads scenes from TOML files; refuses as <see cref="SheetReader"/> does.</summary>
internal static class SceneReader
{
    private static readonly TomlFile Kind = new("scene", "the scene", "give the .toml file that describes the scene");

    /// <summary>Reads a scene and the electrode tables that it names.</summary>
    /// <param name="path">Its file.</param>
    /// <exception cref="RefusedException">It can't be read, or something in it is wrong.</exception>
    public static Scene Read(string path) => Parse(Kind.TextOf(path), path);

    /// <summary>Reads a scene from its text.</summary>
    /// <param name="text">TOML.</param>
    /// <param name="path">Where it comes from, for messages; paths in it are relative to its folder.</param>
    /// <exception cref="RefusedException">Something in it is wrong.</exception>
    public static Scene Parse(string text, string path)
    {
        var folder = Path.GetDirectoryName(path) ?? "";
        var parsed = TomlTables.Parse(text, out var faults);
        if (faults.Count == 0 && SceneForm.TryRead(parsed, (table, unit) => Electrodes(Path.Combine(folder, table), unit), out var scene, out faults))
        {
            return scene;
        }

        throw TomlFile.Refusal(path, faults);
    }

    private static List<Electrode> Electrodes(string path, string unit)
    {
        var electrodes = ElectrodeTable.Read(path, unit).Select(place => new Electrode(place.Name, place.XMm, place.YMm)).ToList();
        return electrodes.Count > 0
            ? electrodes
            : throw new RefusedException("no electrode in it has a position", path, "give a table with x and y");
    }
}
