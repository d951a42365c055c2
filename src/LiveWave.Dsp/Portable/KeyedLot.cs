namespace LiveWave.Dsp;

/// <summary>
/// Lots for shams and permutations: a number in [0, 1) that follows from a key alone, never from a sequence. Changing one
/// rule's name changes that rule's lots and no others; two sessions from one sheet do not repeat each other.
/// </summary>
/// <remarks>
/// <para>
/// h = mix(seed), then for session id, rule and onset in turn h = mix(h xor part). A text's part is its FNV-1a hash (Fowler,
/// Noll and Vo 1991), 64 bits, over UTF-16 code units, low byte first. mix adds 0x9E3779B97F4A7C15 and applies the SplitMix64
/// finaliser (Steele, Lea and Flood 2014). The first 53 bits of h make the number.
/// </para>
/// <para>Stable over runtimes, machines and program versions: recorded sessions rest on it. Does not allocate.</para>
/// </remarks>
public static class KeyedLot
{
    private const ulong FnvBasis = 0xCBF29CE484222325;
    private const ulong FnvPrime = 0x00000100000001B3;

    /// <summary>Draws the lot of one wave event under one rule.</summary>
    /// <param name="seed">The sheet's seed.</param>
    /// <param name="sessionId">The session's id, compared by code unit.</param>
    /// <param name="rule">The rule's name, compared by code unit.</param>
    /// <param name="onset">Sample at which the wave event began.</param>
    /// <returns>0 up to, not including, 1; a multiple of 2⁻⁵³.</returns>
    public static double Draw(ulong seed, string sessionId, string rule, long onset)
    {
        ArgumentNullException.ThrowIfNull(sessionId);
        ArgumentNullException.ThrowIfNull(rule);
        return (long)(Key(seed, sessionId, rule, onset) >> 11) * PowerOfTwo.Of(-53);
    }

    /// <summary>The 64 bits behind a lot.</summary>
    internal static ulong Key(ulong seed, string first, string second, long number)
    {
        var key = Mix(seed);
        key = Mix(key ^ HashOf(first));
        key = Mix(key ^ HashOf(second));
        return Mix(key ^ (ulong)number);
    }

    private static ulong HashOf(string text)
    {
        var hash = FnvBasis;
        foreach (var unit in text)
        {
            hash = (hash ^ (byte)unit) * FnvPrime;
            hash = (hash ^ (byte)(unit >> 8)) * FnvPrime;
        }

        return hash;
    }

    private static ulong Mix(ulong key)
    {
        key += 0x9E3779B97F4A7C15;
        key = (key ^ (key >> 30)) * 0xBF58476D1CE4E5B9;
        key = (key ^ (key >> 27)) * 0x94D049BB133111EB;
        return key ^ (key >> 31);
    }
}
