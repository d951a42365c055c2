namespace LiveWave.Recordings.Tests;

/// <summary>Numbers that are the same in every run and on every runtime (splitmix64).</summary>
internal sealed class Seeded(ulong seed)
{
    private ulong _state = seed;

    public ulong Next()
    {
        var z = _state += 0x9E3779B97F4A7C15;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }

    public int Below(int bound) => (int)(Next() % (ulong)bound);
}
