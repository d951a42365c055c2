using LiveWave.Abstractions;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>Reads the truth that lies beside a synthetic recording: <c>NAME.truth.tsv</c>.</summary>
internal static class TruthTable
{
    /// <summary>The path at which the truth of a recording would lie.</summary>
    public static string PathBeside(string recording) => Path.ChangeExtension(recording, ".truth.tsv");

    /// <exception cref="RefusedException">A column is missing or a cell is not a number.</exception>
    public static IReadOnlyList<TruthRow> Read(string path)
    {
        var table = BidsTable.Read(path);
        return
        [
            .. Enumerable.Range(0, table.RowCount).Select(row => new TruthRow(
                table.Number(row, "onset"),
                table.Number(row, "duration"),
                table.Text(row, "trial_type") ?? "",
                table.Number(row, "direction_degrees"),
                string.Equals(table.Text(row, "strong"), "yes", StringComparison.Ordinal))),
        ];
    }
}
