using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>The horizons that a band declares, as an estimator prepared them.</summary>
internal sealed class Horizons
{
    private readonly int[] _samples;

    /// <summary>Takes a band's horizons.</summary>
    /// <param name="band">The band.</param>
    /// <exception cref="RefusedException">One is negative.</exception>
    internal Horizons(Band band)
    {
        _samples = [.. band.HorizonSamples];
        foreach (var samples in _samples)
        {
            if (samples < 0) throw new RefusedException($"a horizon of {samples} rows", $"band '{band.Name}'", "give 0 or more");
            Longest = Math.Max(Longest, samples);
        }
    }

    /// <summary>How many there are.</summary>
    internal int Count => _samples.Length;

    /// <summary>The longest, rows; 0 where there is none.</summary>
    internal int Longest { get; }

    /// <summary>One horizon, rows.</summary>
    internal int this[int index] => _samples[index];

    /// <summary>Where a horizon stands among those declared. A few at most, hence searched one by one.</summary>
    /// <exception cref="ArgumentOutOfRangeException">It was not declared.</exception>
    internal int IndexOf(int horizonSamples)
    {
        var index = _samples.AsSpan().IndexOf(horizonSamples);
        return index >= 0
            ? index
            : throw new ArgumentOutOfRangeException(nameof(horizonSamples), horizonSamples, "not a horizon that the band declares");
    }
}
