namespace LiveWave.Dsp;

/// <summary>One sequence of lots of a scene, keyed by what it is for: a new part of a scene does not reshuffle the others.</summary>
/// <remarks>SplitMix64 (Steele, Lea and Flood 2014); normals after Box and Muller (1958), cosine before sine.</remarks>
internal sealed class SceneLots
{
    private ulong _state;
    private double _spare = double.NaN;

    /// <summary>Opens a sequence.</summary>
    /// <param name="seed">Of the scene or rig.</param>
    /// <param name="part">What it is for.</param>
    /// <param name="owner">Whose: a patch, a channel; may be empty.</param>
    /// <param name="number">Which of several.</param>
    public SceneLots(ulong seed, string part, string owner = "", long number = 0) => _state = KeyedLot.Key(seed, part, owner, number);

    /// <summary>Uniform between 0 and 1, both excluded.</summary>
    public double Uniform() => ((long)(Bits() >> 11) + 0.5) * PowerOfTwo.Of(-53);

    /// <summary>Uniform, up to <paramref name="spread"/> to either side of 0.</summary>
    public double Spread(double spread) => spread * ((2 * Uniform()) - 1);

    /// <summary>Normal, mean 0, variance 1.</summary>
    public double Normal()
    {
        if (!double.IsNaN(_spare))
        {
            var spare = _spare;
            _spare = double.NaN;
            return spare;
        }

        var length = Math.Sqrt(-2 * Portable.Log(Uniform()));
        var (sine, cosine) = Portable.SinCos(2 * Math.PI * Uniform());
        _spare = length * sine;
        return length * cosine;
    }

    private ulong Bits()
    {
        _state += 0x9E3779B97F4A7C15;
        var bits = _state;
        bits = (bits ^ (bits >> 30)) * 0xBF58476D1CE4E5B9;
        bits = (bits ^ (bits >> 27)) * 0x94D049BB133111EB;
        return bits ^ (bits >> 31);
    }
}
