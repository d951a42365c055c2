namespace LiveWave.Abstractions;

/// <summary>Turns rows into rows before phase. Causal; does not allocate after <see cref="Prepare"/>; on the way to a decision.</summary>
public interface IConditioner
{
    /// <summary>Makes ready for a stream.</summary>
    /// <param name="input">What comes in.</param>
    /// <returns>What comes out.</returns>
    StreamFormat Prepare(StreamFormat input);

    /// <summary>Takes one row.</summary>
    /// <param name="row">Physical units, NaN = missing; a NaN stays in its channel.</param>
    /// <param name="conditioned">Filled when a row comes out.</param>
    /// <returns>True if a row came out; a decimator swallows the others.</returns>
    bool Step(ReadOnlySpan<double> row, Span<double> conditioned);

    /// <summary>Back to rest: as new.</summary>
    void Reset();

    /// <summary>Delay of a slow change at a frequency (group delay), seconds.</summary>
    /// <param name="frequencyHz">Above 0, below half the output rate.</param>
    double DelaySeconds(double frequencyHz);
}
