namespace LiveWave.Pipeline;

/// <summary>Finds the word that was probably meant.</summary>
internal static class Spelling
{
    /// <summary>The nearest of some words.</summary>
    /// <param name="written">What was written.</param>
    /// <param name="allowed">What could have been meant.</param>
    /// <returns>Null where none is near: further than a third of the letters away, and neither begins with the other.</returns>
    public static string? Nearest(string written, IEnumerable<string> allowed)
    {
        string? nearest = null;
        var least = int.MaxValue;
        foreach (var word in allowed)
        {
            var distance = Distance(written, word);
            if (distance >= least || !IsNear(written, word, distance)) continue;
            (nearest, least) = (word, distance);
        }

        return nearest;
    }

    /// <summary>A ready-made "did you mean", or nothing.</summary>
    public static string Hint(string written, IEnumerable<string> allowed) =>
        Nearest(written, allowed) is { } word ? $"did you mean '{word}'? " : "";

    private static bool IsNear(string written, string word, int distance) =>
        distance <= Math.Max(1, Math.Max(written.Length, word.Length) / 3)
        || (written.Length >= 3 && word.StartsWith(written, StringComparison.OrdinalIgnoreCase))
        || (word.Length >= 3 && written.StartsWith(word, StringComparison.OrdinalIgnoreCase));

    /// <summary>Letters to change, add, drop or swap with their neighbour (Damerau 1964), without regard to capitals.</summary>
    private static int Distance(string a, string b)
    {
        // A key of a thousand letters is nobody's slip of the pen, and the table would grow with its square.
        if (a.Length > 100 || b.Length > 100) return int.MaxValue;

        var cost = new int[a.Length + 1, b.Length + 1];
        for (var i = 0; i <= a.Length; i++) cost[i, 0] = i;
        for (var j = 0; j <= b.Length; j++) cost[0, j] = j;
        for (var i = 1; i <= a.Length; i++)
        {
            for (var j = 1; j <= b.Length; j++)
            {
                var change = Same(a[i - 1], b[j - 1]) ? 0 : 1;
                var least = Math.Min(Math.Min(cost[i - 1, j] + 1, cost[i, j - 1] + 1), cost[i - 1, j - 1] + change);
                var swapped = i > 1 && j > 1 && Same(a[i - 1], b[j - 2]) && Same(a[i - 2], b[j - 1]);
                cost[i, j] = swapped ? Math.Min(least, cost[i - 2, j - 2] + 1) : least;
            }
        }

        return cost[a.Length, b.Length];
    }

    private static bool Same(char a, char b) => char.ToLowerInvariant(a) == char.ToLowerInvariant(b);
}
