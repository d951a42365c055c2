using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The conditioners of a run, in order. A row goes in; a row comes out, or none where one decimates.</summary>
public sealed class ConditioningChain
{
    private readonly IConditioner[] _conditioners;
    private readonly double[][] _rows;

    /// <summary>Prepares the conditioners.</summary>
    /// <param name="conditioners">In order; may be empty.</param>
    /// <param name="input">The stream.</param>
    public ConditioningChain(IReadOnlyList<IConditioner> conditioners, StreamFormat input)
    {
        ArgumentNullException.ThrowIfNull(conditioners);
        _conditioners = [.. conditioners];
        _rows = new double[_conditioners.Length][];
        Output = input;
        for (var i = 0; i < _conditioners.Length; i++)
        {
            Output = _conditioners[i].Prepare(Output);
            _rows[i] = new double[Output.ChannelCount];
        }
    }

    /// <summary>What comes out.</summary>
    public StreamFormat Output { get; }

    /// <summary>Takes one row.</summary>
    /// <param name="row">Physical units, NaN = missing.</param>
    /// <param name="conditioned">The row that came out; valid until the next step.</param>
    /// <returns>True if a row came out.</returns>
    public bool Step(ReadOnlySpan<double> row, out ReadOnlySpan<double> conditioned)
    {
        conditioned = row;
        for (var i = 0; i < _conditioners.Length; i++)
        {
            if (!_conditioners[i].Step(conditioned, _rows[i])) return false;
            conditioned = _rows[i];
        }

        return true;
    }

    /// <summary>Back to rest.</summary>
    public void Reset()
    {
        foreach (var conditioner in _conditioners) conditioner.Reset();
    }
}
