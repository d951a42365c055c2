namespace LiveWave.Abstractions;

/// <summary>The words for kinds of waves, as sheets and tables write them.</summary>
public static class WaveKinds
{
    private static readonly string[] Words =
    [
        "planar", "rotating-counter-clockwise", "rotating-clockwise", "expanding", "contracting", "front",
        "standing", "in phase", "synchronous", "not resolved", "none",
    ];

    /// <summary>All words, in the order of <see cref="WaveKind"/>.</summary>
    public static IReadOnlyList<string> All => Words;

    /// <summary>True for the kinds that travel.</summary>
    /// <param name="kind">The kind.</param>
    public static bool Travels(WaveKind kind) => kind <= WaveKind.Front;

    /// <summary>The word for a kind. Does not allocate.</summary>
    /// <param name="kind">The kind.</param>
    public static string Word(WaveKind kind) => Words[(int)kind];

    /// <summary>The kind for a word.</summary>
    /// <param name="word">As <see cref="Word"/> writes it.</param>
    /// <param name="kind">The kind.</param>
    /// <returns>False if no kind is called so.</returns>
    public static bool TryParse(string word, out WaveKind kind)
    {
        var at = Array.IndexOf(Words, word);
        kind = at < 0 ? WaveKind.None : (WaveKind)at;
        return at >= 0;
    }
}
