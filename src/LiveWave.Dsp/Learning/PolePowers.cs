using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>The poles of a model's oscillators to the power of a horizon, by repeated multiplication.</summary>
/// <remarks>The relative error grows with one rounding per row: 1e-13 after a thousand rows, far below what matters, and no
/// transcendental function is needed.</remarks>
internal sealed class PolePowers
{
    private readonly IReadOnlyList<OscillatorTerm> _oscillators;

    /// <summary>Starts at horizon 0, where every power is 1.</summary>
    /// <param name="oscillators">The oscillators.</param>
    internal PolePowers(IReadOnlyList<OscillatorTerm> oscillators)
    {
        _oscillators = oscillators;
        Re = new double[oscillators.Count];
        Im = new double[oscillators.Count];
        Re.AsSpan().Fill(1);
    }

    /// <summary>Real parts, per oscillator.</summary>
    internal double[] Re { get; }

    /// <summary>Imaginary parts, per oscillator.</summary>
    internal double[] Im { get; }

    /// <summary>One row further.</summary>
    internal void Advance()
    {
        for (var j = 0; j < Re.Length; j++)
        {
            var term = _oscillators[j];
            var re = (term.PoleRe * Re[j]) - (term.PoleIm * Im[j]);
            Im[j] = (term.PoleRe * Im[j]) + (term.PoleIm * Re[j]);
            Re[j] = re;
        }
    }
}
