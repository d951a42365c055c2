using System.Globalization;
using System.Text;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>A side-car table of BIDS: UTF-8, tab-separated, one header line, no quoting, <c>n/a</c> for what is missing. Lenient in
/// what it reads: an empty cell counts as <c>n/a</c>, empty lines are passed over, a byte order mark is dropped, unknown columns stay.</summary>
public sealed class BidsTable
{
    private const int MostBytes = 16 << 20;
    private const string Missing = "n/a";

    private readonly List<(int Line, string[] Cells)> _rows = [];
    private readonly Dictionary<string, int> _columns = new(StringComparer.Ordinal);

    private BidsTable(string path)
    {
        Path = path;
    }

    /// <summary>The file, as the user gave it.</summary>
    public string Path { get; }

    /// <summary>Names of the columns in their order; case counts.</summary>
    public IReadOnlyList<string> Columns { get; private set; } = [];

    /// <summary>Rows below the header.</summary>
    public int RowCount => _rows.Count;

    /// <summary>Reads a table.</summary>
    /// <param name="path">The file.</param>
    /// <exception cref="RefusedException">The file is missing or too long, a column has no name or one that is used twice, or a line
    /// has another number of cells than the header.</exception>
    public static BidsTable Read(string path)
    {
        using var window = FileWindow.Open(path, FileWindow.ScanBytes);
        if (window.Length > MostBytes)
        {
            throw new RefusedException($"the table has {window.Length} bytes", path, $"at most {MostBytes >> 20} MB are read");
        }

        var bytes = window.Copy(0, (int)window.Length).AsSpan();
        if (bytes.StartsWith((ReadOnlySpan<byte>)[0xEF, 0xBB, 0xBF])) bytes = bytes[3..];
        var table = new BidsTable(path);
        table.Parse(Encoding.UTF8.GetString(bytes));
        return table;
    }

    /// <summary>Tells if the table has a column.</summary>
    /// <param name="column">Its name.</param>
    public bool Has(string column) => _columns.ContainsKey(column);

    /// <summary>The text of a cell.</summary>
    /// <param name="row">0 to <see cref="RowCount"/> − 1.</param>
    /// <param name="column">Name of the column.</param>
    /// <returns>Null where it is missing.</returns>
    /// <exception cref="RefusedException">There is no such column.</exception>
    public string? Text(int row, string column)
    {
        Require(column);
        var cell = _rows[row].Cells[_columns[column]];
        return cell.Length == 0 || cell == Missing ? null : cell;
    }

    /// <summary>The number in a cell, with a decimal point.</summary>
    /// <param name="row">0 to <see cref="RowCount"/> − 1.</param>
    /// <param name="column">Name of the column.</param>
    /// <returns>Finite, or NaN where it is missing.</returns>
    /// <exception cref="RefusedException">There is no such column, or the cell holds something else.</exception>
    public double Number(int row, string column)
    {
        if (Text(row, column) is not { } cell) return double.NaN;
        if (double.TryParse(cell, NumberStyles.Float, CultureInfo.InvariantCulture, out var number) && double.IsFinite(number)) return number;
        throw Refusal(row, column, $"'{PlainText.Of(cell)}' is not a number", $"write a number with a decimal point, or {Missing}");
    }

    /// <summary>Asks for columns.</summary>
    /// <param name="columns">Their names.</param>
    /// <exception cref="RefusedException">One is not there; the message lists those that are.</exception>
    public void Require(params ReadOnlySpan<string> columns)
    {
        foreach (var column in columns)
        {
            if (Has(column)) continue;
            throw new RefusedException($"column '{column}' is missing", Path + ", line 1", "it has " + PlainText.Of(string.Join(", ", Columns)));
        }
    }

    /// <summary>Refuses the content of a cell.</summary>
    /// <param name="row">0 to <see cref="RowCount"/> − 1.</param>
    /// <param name="column">Name of the column.</param>
    /// <param name="what">What is wrong.</param>
    /// <param name="advice">What to do.</param>
    /// <returns>To be thrown; its place is file, line and column.</returns>
    public RefusedException Refusal(int row, string column, string what, string advice) =>
        new(what, $"{Path}, line {LineOf(row)}, column '{column}'", advice);

    /// <summary>The line of a row in the file.</summary>
    /// <param name="row">0 to <see cref="RowCount"/> − 1.</param>
    public int LineOf(int row) => _rows[row].Line;

    private void Parse(string text)
    {
        var line = 0;
        foreach (var raw in text.AsSpan().EnumerateLines())
        {
            line++;
            if (raw.IsWhiteSpace()) continue;
            var cells = raw.ToString().Split('\t', StringSplitOptions.TrimEntries);
            if (Columns.Count == 0) Header(cells, line);
            else Row(cells, line);
        }

        if (Columns.Count == 0) throw new RefusedException("the table is empty", Path, "its first line names the columns, separated by tabs");
    }

    private void Header(string[] cells, int line)
    {
        for (var i = 0; i < cells.Length; i++)
        {
            if (cells[i].Length == 0) throw new RefusedException($"column {i + 1} has no name", $"{Path}, line {line}", "name every column");
            if (_columns.TryAdd(cells[i], i)) continue;
            throw new RefusedException(
                $"two columns are called '{PlainText.Of(cells[i])}'", $"{Path}, line {line}", $"they are columns {_columns[cells[i]] + 1} and {i + 1}");
        }

        Columns = cells;
    }

    private void Row(string[] cells, int line)
    {
        if (cells.Length != Columns.Count)
        {
            throw new RefusedException(
                $"{cells.Length} cells, the header has {Columns.Count}", $"{Path}, line {line}", $"separate cells by one tab, write {Missing} where one is missing");
        }

        _rows.Add((line, cells));
    }
}
