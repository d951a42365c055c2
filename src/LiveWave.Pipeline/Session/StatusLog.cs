using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary><c>run.log.jsonl</c>: statuses, one JSON object a line.</summary>
public sealed class StatusLog : IDisposable
{
    private readonly FileStream _file;

    /// <summary>Creates the file.</summary>
    /// <param name="path">Must not exist.</param>
    public StatusLog(string path) => _file = new FileStream(path, FileMode.CreateNew, FileAccess.Write, FileShare.Read);

    /// <summary>Adds a status.</summary>
    /// <param name="status">The status.</param>
    public void Add(in Status status)
    {
        using (var json = new Utf8JsonWriter(_file))
        {
            json.WriteStartObject();
            json.WriteNumber("atSeconds", Math.Round(status.AtSeconds, 6));
            json.WriteString("level", Word(status.Level));
            json.WriteString("where", status.Where);
            json.WriteString("what", status.What);
            if (status.Advice.Length > 0) json.WriteString("advice", status.Advice);
            json.WriteEndObject();
        }

        _file.WriteByte((byte)'\n');
    }

    /// <summary>Hands everything to the operating system, and on to the medium if asked.</summary>
    /// <param name="toMedium">Survives a power cut.</param>
    public void Flush(bool toMedium) => _file.Flush(toMedium);

    /// <summary>The word for a level.</summary>
    /// <param name="level">The level.</param>
    public static string Word(StatusLevel level) => level switch
    {
        StatusLevel.Note => "note",
        StatusLevel.Warning => "warning",
        _ => "fault",
    };

    /// <inheritdoc/>
    public void Dispose() => _file.Dispose();
}
