using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>What a reader has to say about a file: bounded, since a hostile file could have something to say for ever.</summary>
/// <param name="path">The file, as the user gave it.</param>
internal sealed class ReadWarnings(string path)
{
    private const int Most = 200;

    private readonly List<Status> _all = [];

    /// <summary>Everything said so far; the last one says so when the bound was reached.</summary>
    public IReadOnlyList<Status> All => _all;

    /// <summary>Says something about the file as a whole.</summary>
    /// <param name="what">One sentence.</param>
    /// <param name="advice">What follows from it.</param>
    public void Add(string what, string advice = "") => Add(path, what, advice);

    /// <summary>Says something about a place in the file.</summary>
    /// <param name="offset">First byte concerned, from 0.</param>
    /// <param name="what">One sentence.</param>
    /// <param name="skippedBytes">Bytes that were not read because of it.</param>
    public void Add(long offset, string what, long skippedBytes) =>
        Add($"{path}, byte {offset}", what, skippedBytes > 0 ? $"{skippedBytes} bytes skipped" : "");

    /// <summary>Says something about a place in the file.</summary>
    /// <param name="offset">First byte concerned, from 0.</param>
    /// <param name="what">One sentence.</param>
    /// <param name="advice">What was done, or what to do.</param>
    public void Add(long offset, string what, string advice) => Add($"{path}, byte {offset}", what, advice);

    /// <summary>Takes over what was said before.</summary>
    /// <param name="earlier">From another list about the same file.</param>
    public void AddAll(IReadOnlyList<Status> earlier)
    {
        foreach (var one in earlier) Add(one.Where, one.What, one.Advice);
    }

    private void Add(string where, string what, string advice)
    {
        if (_all.Count > Most) return;
        _all.Add(_all.Count < Most
            ? new Status(StatusLevel.Warning, where, what, advice, double.NaN)
            : new Status(StatusLevel.Warning, path, $"more than {Most} warnings", "the rest is not listed", double.NaN));
    }
}
