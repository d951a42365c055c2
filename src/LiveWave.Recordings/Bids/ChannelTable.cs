using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>Reads a BIDS <c>channels.tsv</c>: columns <c>name</c>, <c>type</c>, <c>units</c>, and <c>status</c> if it is there; what
/// else it has is not used.</summary>
public static class ChannelTable
{
    /// <summary>Reads the channels.</summary>
    /// <param name="path">The file.</param>
    /// <returns>In the order of the table, which need not be that of the recording: match by name.</returns>
    /// <exception cref="RefusedException">The file is no table, a column is missing, a name is missing or used twice, or a status is
    /// neither <c>good</c> nor <c>bad</c>.</exception>
    public static IReadOnlyList<TableChannel> Read(string path)
    {
        var table = BidsTable.Read(path);
        table.Require("name", "type", "units");
        var channels = new List<TableChannel>(table.RowCount);
        var lines = new Dictionary<string, int>(StringComparer.Ordinal);
        for (var row = 0; row < table.RowCount; row++)
        {
            var name = table.Text(row, "name") ?? throw table.Refusal(row, "name", "the channel has no name", "name it as in the recording");
            if (!lines.TryAdd(name, table.LineOf(row)))
            {
                throw table.Refusal(row, "name", $"'{PlainText.Of(name)}' is there twice", $"the other is in line {lines[name]}");
            }

            channels.Add(new TableChannel(name, table.Text(row, "type") ?? "", table.Text(row, "units") ?? "", IsGood(table, row)));
        }

        return channels;
    }

    private static bool? IsGood(BidsTable table, int row) => (table.Has("status") ? table.Text(row, "status") : null) switch
    {
        null => null,
        "good" => true,
        "bad" => false,
        var other => throw table.Refusal(row, "status", $"status '{PlainText.Of(other)}' is not known", "write good, bad or n/a"),
    };
}
