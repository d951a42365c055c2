using LiveWave.Abstractions;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>Makes the patches of a sheet: which channels of the stream, and where their electrodes lie.</summary>
internal static class PatchReader
{
    /// <exception cref="RefusedException">Electrodes and channels don't go together.</exception>
    public static PatchSetup Read(SessionSheet sheet, PatchTable patch, StreamFormat format)
    {
        var path = sheet.PathOf(patch.Electrodes);
        var electrodes = new Dictionary<string, (double XMm, double YMm)>(StringComparer.Ordinal);
        foreach (var (name, x, y) in ElectrodeTable.Read(path, patch.Unit)) electrodes.Add(name, (x, y));
        var numbers = new Dictionary<string, int>(StringComparer.Ordinal);
        for (var i = 0; i < format.ChannelCount; i++) _ = numbers.TryAdd(format.Channels[i].Label, i);
        var wanted = patch.Channels.Count > 0
            ? patch.Channels
            : [.. format.Channels.Select(channel => channel.Label).Where(electrodes.ContainsKey)];
        Check(patch, path, format, electrodes.Keys, numbers, wanted);
        var layout = new Layout(
            [.. wanted.Select(name => new Electrode(name, electrodes[name].XMm, electrodes[name].YMm, !patch.BadChannels.Contains(name)))],
            patch.RotationDegrees,
            patch.SeenFrom,
            patch.Axes);
        return new PatchSetup(patch.Name, [.. wanted.Select(name => numbers[name])], layout);
    }

    private static void Check(
        PatchTable patch,
        string path,
        StreamFormat format,
        Dictionary<string, (double XMm, double YMm)>.KeyCollection electrodes,
        Dictionary<string, int> numbers,
        IReadOnlyList<string> wanted)
    {
        var where = $"{path}, patch '{patch.Name}'";
        var strangers = wanted.Where(name => !numbers.ContainsKey(name)).ToList();
        if (strangers.Count > 0) throw new RefusedException($"channel '{strangers[0]}' is not in the stream", where, Held(format));
        var placeless = wanted.Where(name => !electrodes.Contains(name)).ToList();
        if (placeless.Count > 0)
        {
            throw new RefusedException($"channel '{placeless[0]}' has no electrode with a position", where, "add it to the table, or leave the channel out");
        }

        if (patch.Channels.Count > 0) return;
        var missing = electrodes.Where(name => !numbers.ContainsKey(name)).ToList();
        if (missing.Count > 0)
        {
            throw new RefusedException(
                $"the layout has {electrodes.Count} electrodes, and {missing.Count} of them ('{missing[0]}' first) have no channel in the stream",
                where,
                Held(format) + "; name the patch's channels, or give its own table");
        }

        if (wanted.Count == 0) throw new RefusedException("no channel of the stream has an electrode", where, Held(format));
    }

    private static string Held(StreamFormat format) =>
        $"the stream has {format.ChannelCount} channels, '{format.Channels[0].Label}' to '{format.Channels[^1].Label}'";
}
