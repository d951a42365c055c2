namespace LiveWave.App;

/// <summary>Finds labels: the same to the letter, else the only one that differs in capitals or dots at the end.</summary>
internal sealed class LabelMatch
{
    private const int Ambiguous = -1;
    private readonly Dictionary<string, int> _exact = new(StringComparer.Ordinal);
    private readonly Dictionary<string, int> _loose = new(StringComparer.OrdinalIgnoreCase);

    public LabelMatch(IReadOnlyList<string> labels)
    {
        for (var i = 0; i < labels.Count; i++)
        {
            _ = _exact.TryAdd(labels[i], i);
            if (!_loose.TryAdd(Bare(labels[i]), i)) _loose[Bare(labels[i])] = Ambiguous;
        }
    }

    /// <returns>The label's place, negative if there is none, or more than one that is only similar.</returns>
    public int Find(string label)
    {
        if (_exact.TryGetValue(label, out var exact)) return exact;
        return _loose.TryGetValue(Bare(label), out var loose) ? loose : Ambiguous;
    }

    private static string Bare(string label) => label.TrimEnd('.', ' ');
}
