namespace LiveWave.Dsp;

/// <summary>One fault at work on rows.</summary>
internal sealed class FaultOnChannels
{
    private const int Swings = 6;

    private readonly SceneFault _fault;
    private readonly int[] _channels;
    private readonly SceneLots _lots;
    private readonly double[] _shares;
    private readonly double[] _turnRates;
    private readonly double[] _phases;
    private readonly double _rateHz;
    private readonly double _first;
    private readonly double _end;

    /// <param name="fault">What is wrong.</param>
    /// <param name="rateHz">Rows per second.</param>
    /// <param name="channels">Numbers of its channels in a row.</param>
    /// <param name="lots">What drives it.</param>
    public FaultOnChannels(SceneFault fault, double rateHz, int[] channels, SceneLots lots)
    {
        (_fault, _rateHz, _channels, _lots) = (fault, rateHz, channels, lots);

        // Whole rows: 3.2 s and 0.1 s more would otherwise reach one row further than 3.3 s.
        _first = Math.Round(fault.OnsetSeconds * rateHz);
        _end = _first + Math.Max(1, Math.Round(fault.DurationSeconds * rateHz));
        _shares = [.. channels.Select(_ => 1 + (0.3 * lots.Normal()))];
        _turnRates = [.. Enumerable.Range(0, Swings).Select(_ => 2 * Math.PI * (0.5 + (7.5 * lots.Uniform())))];
        _phases = [.. Enumerable.Range(0, Swings).Select(_ => 2 * Math.PI * lots.Uniform())];
    }

    /// <summary>A row is lost.</summary>
    /// <param name="number">Its number.</param>
    public bool Loses(long number) => _fault.Kind == SceneFaultKind.Gap && IsOn(number);

    /// <summary>Spoils a row. Does not allocate.</summary>
    /// <param name="number">Its number.</param>
    /// <param name="row">All channels, gains and offsets included.</param>
    public void Apply(long number, Span<double> row)
    {
        switch (_fault.Kind)
        {
            case SceneFaultKind.Swapped:
                (row[_channels[0]], row[_channels[1]]) = (row[_channels[1]], row[_channels[0]]);
                break;
            case SceneFaultKind.Dying:
                Fade(row, Math.Clamp((number - _first) / (_end - _first), 0, 1));
                break;
            case SceneFaultKind.Bad when IsOn(number):
                Fade(row, 1);
                break;
            case SceneFaultKind.Saturation when IsOn(number):
                foreach (var channel in _channels) row[channel] = Math.Clamp(row[channel], -_fault.Microvolts, _fault.Microvolts);
                break;
            case SceneFaultKind.Movement when IsOn(number):
                Move(row, (number - _first) / _rateHz);
                break;
        }
    }

    private bool IsOn(long number) => number >= _first && number < _end;

    private void Fade(Span<double> row, double share)
    {
        if (share == 0) return;
        foreach (var channel in _channels) row[channel] = ((1 - share) * row[channel]) + (share * _fault.Microvolts * _lots.Normal());
    }

    private void Move(Span<double> row, double since)
    {
        var swing = 0.0;
        for (var i = 0; i < Swings; i++) swing += Portable.Cos((_turnRates[i] * since) + _phases[i]);
        var height = 0.5 - (0.5 * Portable.Cos(2 * Math.PI * since / _fault.DurationSeconds));
        var value = _fault.Microvolts * height * swing / Math.Sqrt(0.5 * Swings);
        for (var i = 0; i < _channels.Length; i++) row[_channels[i]] += _shares[i] * value;
    }
}
