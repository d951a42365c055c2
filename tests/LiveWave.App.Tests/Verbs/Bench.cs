using System.Buffers.Binary;
using System.Text;

namespace LiveWave.App.Tests;

/// <summary>A folder with a copy of the bundled session, to break one thing at a time.</summary>
internal sealed class Bench : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("livewave-test-");

    public Bench()
    {
        foreach (var name in (string[])["millrace.sheet.toml", "millrace_electrodes.tsv", "millrace.calibration.json"])
        {
            File.Copy(Path.Combine(Bundled, name), At(name));
        }
    }

    public static string Bundled => Path.Combine(AppContext.BaseDirectory, "replay-data");

    public static string Recording => Path.Combine(Bundled, "millrace.xdf");

    public string Sheet => At("millrace.sheet.toml");

    public string At(string name) => Path.Combine(_folder.FullName, name);

    public void Replace(string name, string what, string by)
    {
        var text = File.ReadAllText(At(name));
        Assert.Contains(what, text, StringComparison.Ordinal);
        File.WriteAllText(At(name), text.Replace(what, by, StringComparison.Ordinal));
    }

    /// <summary>A recording of one stream, with a header of one's own and int16 rows.</summary>
    public string WriteRecording(string header, int channels, int rows)
    {
        using var file = new MemoryStream();
        file.Write("XDF:"u8);
        Chunk(file, 1, Encoding.UTF8.GetBytes("<?xml version=\"1.0\"?><info><version>1.0</version></info>"));
        Chunk(file, 2, [1, 0, 0, 0, .. Encoding.UTF8.GetBytes(header)]);
        var samples = new List<byte> { 1, 0, 0, 0, 4 };
        samples.AddRange(BitConverter.GetBytes(rows));
        for (var row = 0; row < rows; row++)
        {
            samples.Add(row == 0 ? (byte)8 : (byte)0);
            if (row == 0) samples.AddRange(BitConverter.GetBytes(100.0));
            for (var channel = 0; channel < channels; channel++) samples.AddRange(BitConverter.GetBytes((short)(((row * 7) + (channel * 13)) % 100)));
        }

        Chunk(file, 3, [.. samples]);
        var path = At("made.xdf");
        File.WriteAllBytes(path, file.ToArray());
        return path;
    }

    public void Dispose() => _folder.Delete(recursive: true);

    private static void Chunk(MemoryStream file, ushort tag, byte[] content)
    {
        Span<byte> head = stackalloc byte[7];
        head[0] = 4;
        BinaryPrimitives.WriteInt32LittleEndian(head[1..], content.Length + 2);
        BinaryPrimitives.WriteUInt16LittleEndian(head[5..], tag);
        file.Write(head);
        file.Write(content);
    }
}
