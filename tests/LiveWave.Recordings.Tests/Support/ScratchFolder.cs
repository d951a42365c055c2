namespace LiveWave.Recordings.Tests;

/// <summary>A folder for the files of one test, gone afterwards.</summary>
internal sealed class ScratchFolder : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("livewave-recordings-");

    public string Path(string name) => System.IO.Path.Combine(_folder.FullName, name);

    public string Write(string name, ReadOnlySpan<byte> bytes)
    {
        File.WriteAllBytes(Path(name), bytes);
        return Path(name);
    }

    public string Write(string name, string text)
    {
        File.WriteAllText(Path(name), text);
        return Path(name);
    }

    public void Dispose() => _folder.Delete(recursive: true);
}
