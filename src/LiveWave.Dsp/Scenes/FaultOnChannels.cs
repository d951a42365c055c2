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

    /// <param name="fault">What is wrong.</param>
    /// <param name="channels">Numbers of its channels in a row.</param>
    /// <param name="lots">What drives it.</param>
    public FaultOnChannels(SceneFault fault, int[] channels, SceneLots lots)
    {
        (_fault, _channels, _lots) = (fault, channels, lots);
        _shares = [.. channels.Select(_ => 1 + (0.3 * lots.Normal()))];
        _turnRates = [.. Enumerable.Range(0, Swings).Select(_ => 2 * Math.PI * (0.5 + (7.5 * lots.Uniform())))];
        _phases = [.. Enumerable.Range(0, Swings).Select(_ => 2 * Math.PI * lots.Uniform())];
    }

    /// <summary>The row at this instant is lost.</summary>
    public bool Loses(double seconds) => _fault.Kind == SceneFaultKind.Gap && IsOn(seconds);

    /// <summary>Spoils a row. Does not allocate.</summary>
    /// <param name="seconds">The row's instant.</param>
    /// <param name="row">All channels, gains and offsets included.</param>
    public void Apply(double seconds, Span<double> row)
    {
        switch (_fault.Kind)
        {
            case SceneFaultKind.Swapped:
                (row[_channels[0]], row[_channels[1]]) = (row[_channels[1]], row[_channels[0]]);
                break;
            case SceneFaultKind.Dying:
                Fade(row, Math.Clamp((seconds - _fault.OnsetSeconds) / _fault.DurationSeconds, 0, 1));
                break;
            case SceneFaultKind.Bad when IsOn(seconds):
                Fade(row, 1);
                break;
            case SceneFaultKind.Saturation when IsOn(seconds):
                foreach (var channel in _channels) row[channel] = Math.Clamp(row[channel], -_fault.Microvolts, _fault.Microvolts);
                break;
            case SceneFaultKind.Movement when IsOn(seconds):
                Move(row, seconds - _fault.OnsetSeconds);
                break;
        }
    }

    private bool IsOn(double seconds) => seconds >= _fault.OnsetSeconds && seconds < _fault.OnsetSeconds + _fault.DurationSeconds;

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
