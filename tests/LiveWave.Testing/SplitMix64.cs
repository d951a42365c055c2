using LiveWave.Dsp;

namespace LiveWave.Testing;

/// <summary>Pseudo-random numbers that are the same everywhere (Steele, Lea and Flood 2014), so that tests can fix what follows from them.</summary>
/// <param name="seed">Any number.</param>
public sealed class SplitMix64(ulong seed)
{
    private ulong _state = seed;
    private double _spare = double.NaN;

    /// <summary>The next 64 bits.</summary>
    public ulong NextBits()
    {
        _state += 0x9E3779B97F4A7C15;
        var bits = _state;
        bits = (bits ^ (bits >> 30)) * 0xBF58476D1CE4E5B9;
        bits = (bits ^ (bits >> 27)) * 0x94D049BB133111EB;
        return bits ^ (bits >> 31);
    }

    /// <summary>Uniform between 0 and 1, both excluded: ((bits >> 11) + ½) / 2⁵³.</summary>
    public double NextUniform() => ((long)(NextBits() >> 11) + 0.5) / (1L << 53);

    /// <summary>Uniform between two limits.</summary>
    public double NextUniform(double from, double to) => from + ((to - from) * NextUniform());

    /// <summary>Normal with mean 0 and variance 1 (Box and Muller 1958): of each pair of uniforms first the cosine, then the sine value.</summary>
    public double NextNormal()
    {
        if (!double.IsNaN(_spare))
        {
            var spare = _spare;
            _spare = double.NaN;
            return spare;
        }

        var length = Math.Sqrt(-2 * Portable.Log(NextUniform()));
        var (sine, cosine) = Portable.SinCos(2 * Math.PI * NextUniform());
        _spare = length * sine;
        return length * cosine;
    }
}
