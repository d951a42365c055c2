using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The folder that a run writes; never one that holds something already.</summary>
public sealed class SessionFolder
{
    private SessionFolder(string path) => FullPath = path;

    /// <summary>Where it is.</summary>
    public string FullPath { get; }

    /// <summary>Makes the folder.</summary>
    /// <param name="path">Absent, or an empty folder.</param>
    /// <exception cref="RefusedException">Something is there, or it can't be made.</exception>
    public static SessionFolder Create(string path)
    {
        var full = Path.GetFullPath(path);
        if (File.Exists(full)) throw new RefusedException("a file stands where the session folder should be", path, "give another --out");
        if (Directory.Exists(full) && Directory.EnumerateFileSystemEntries(full).Any())
        {
            throw new RefusedException("the session folder is not empty", path, "a session is never overwritten: give another --out");
        }

        try
        {
            _ = Directory.CreateDirectory(full);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            throw new RefusedException($"the session folder can't be made ({error.Message})", path, "give another --out", error);
        }

        return new SessionFolder(full);
    }

    /// <summary>The path of a file in it.</summary>
    /// <param name="name">Its name.</param>
    public string At(string name) => Path.Combine(FullPath, name);
}
