using System.Text;

namespace LiveWave.Pipeline;

/// <summary>A table of tab-separated values with a heading, written line by line; never overwrites.</summary>
public sealed class TableFile : IDisposable
{
    private readonly FileStream _file;
    private readonly StreamWriter _writer;
    private readonly int _columns;

    /// <summary>Creates the file and writes the heading.</summary>
    /// <param name="path">Must not exist.</param>
    /// <param name="columns">Names.</param>
    public TableFile(string path, params string[] columns)
    {
        ArgumentNullException.ThrowIfNull(columns);
        _columns = columns.Length;
        _file = new FileStream(path, FileMode.CreateNew, FileAccess.Write, FileShare.Read);
        _writer = new StreamWriter(_file, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false)) { NewLine = "\n" };
        _writer.WriteLine(string.Join('\t', columns));
    }

    /// <summary>Adds a line.</summary>
    /// <param name="cells">One per column.</param>
    /// <exception cref="ArgumentException">Too many or too few cells.</exception>
    public void Add(params string[] cells)
    {
        ArgumentNullException.ThrowIfNull(cells);
        if (cells.Length != _columns) throw new ArgumentException($"{cells.Length} cells for {_columns} columns", nameof(cells));
        _writer.WriteLine(string.Join('\t', cells));
    }

    /// <summary>Hands everything to the operating system, and on to the medium if asked.</summary>
    /// <param name="toMedium">Survives a power cut.</param>
    public void Flush(bool toMedium)
    {
        _writer.Flush();
        if (toMedium) _file.Flush(flushToDisk: true);
    }

    /// <inheritdoc/>
    public void Dispose() => _writer.Dispose();
}
