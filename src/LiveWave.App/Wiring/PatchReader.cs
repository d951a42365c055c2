using LiveWave.Abstractions;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>Makes the patches of a sheet: which channels of the stream, and where their electrodes lie.</summary>
/// <remarks>Channels and electrodes are matched by label. Where no label is the same to the letter, capitals and dots at the end do not
/// count (recordings write <c>Fc5.</c> where tables write <c>FC5</c>), as long as only one fits.</remarks>
internal static class PatchReader
{
    /// <exception cref="RefusedException">Electrodes and channels don't go together.</exception>
    public static PatchSetup Read(SessionSheet sheet, PatchTable patch, StreamFormat format)
    {
        var path = sheet.PathOf(patch.Electrodes);
        var where = $"{path}, patch '{patch.Name}'";
        var electrodes = ElectrodeTable.Read(path, patch.Unit);
        var places = new LabelMatch([.. electrodes.Select(electrode => electrode.Name)]);
        var channels = patch.Channels.Count > 0
            ? Named(patch.Channels, format, places, where)
            : All(format, places, electrodes, where);
        foreach (var name in patch.BadChannels.Where(name => places.Find(name) < 0))
        {
            throw new RefusedException($"bad channel '{name}' is none of its electrodes", where, "mend badChannels in " + sheet.File);
        }

        var bad = new LabelMatch(patch.BadChannels);
        return new PatchSetup(
            patch.Name,
            channels,
            new Layout(
                [.. channels.Select(channel => Place(electrodes, places, bad, format.Channels[channel].Label))],
                patch.RotationDegrees,
                patch.SeenFrom,
                patch.Axes));
    }

    private static Electrode Place(
        IReadOnlyList<(string Name, double XMm, double YMm)> electrodes, LabelMatch places, LabelMatch bad, string label)
    {
        var (name, x, y) = electrodes[places.Find(label)];
        return new Electrode(name, x, y, bad.Find(name) < 0 && bad.Find(label) < 0);
    }

    private static List<int> Named(IReadOnlyList<string> names, StreamFormat format, LabelMatch places, string where)
    {
        var stream = new LabelMatch([.. format.Channels.Select(channel => channel.Label)]);
        var channels = new List<int>();
        foreach (var name in names)
        {
            var channel = stream.Find(name);
            if (channel < 0) throw new RefusedException($"channel '{name}' is not in the stream", where, Held(format));
            if (places.Find(format.Channels[channel].Label) < 0)
            {
                throw new RefusedException(
                    $"channel '{name}' has no electrode with a position", where, "add it to the table, or leave the channel out");
            }

            channels.Add(channel);
        }

        return channels;
    }

    private static List<int> All(
        StreamFormat format, LabelMatch places, IReadOnlyList<(string Name, double XMm, double YMm)> electrodes, string where)
    {
        var channels = Enumerable.Range(0, format.ChannelCount).Where(channel => places.Find(format.Channels[channel].Label) >= 0).ToList();
        if (channels.Count == 0) throw new RefusedException("no channel of the stream has an electrode", where, Held(format));
        var found = channels.Select(channel => places.Find(format.Channels[channel].Label)).ToHashSet();
        var missing = Enumerable.Range(0, electrodes.Count).Where(electrode => !found.Contains(electrode)).ToList();
        if (missing.Count == 0) return channels;
        throw new RefusedException(
            $"the layout has {electrodes.Count} electrodes, and {missing.Count} of them ('{electrodes[missing[0]].Name}' first) have no channel "
            + "in the stream",
            where,
            Held(format) + "; name the patch's channels, or give its own table");
    }

    private static string Held(StreamFormat format) =>
        $"the stream has {format.ChannelCount} channels, '{format.Channels[0].Label}' to '{format.Channels[^1].Label}'";
}
