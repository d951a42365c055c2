namespace LiveWave.Dsp;

/// <summary>Independent 1/f noises of variance 1, stationary from the first row on.</summary>
internal sealed class FirstOrderNoise
{
    private readonly FirstOrderBank _bank;
    private readonly SceneLots _lots;
    private readonly double[] _drives;
    private readonly double[][] _states;
    private readonly double[] _row;
    private bool _isRunning;

    /// <summary>Makes the noises.</summary>
    /// <param name="bank">Their spectrum.</param>
    /// <param name="count">How many.</param>
    /// <param name="lots">What drives them.</param>
    public FirstOrderNoise(FirstOrderBank bank, int count, SceneLots lots)
    {
        (_bank, _lots) = (bank, lots);
        _drives = [.. bank.Poles.Zip(bank.Shares, (pole, share) => Math.Sqrt((1 - (pole * pole)) * share))];
        _states = [.. bank.Poles.Select(_ => new double[count])];
        _row = new double[count];
    }

    /// <summary>The next row. Does not allocate.</summary>
    /// <returns>One value a noise; valid until the next call.</returns>
    public ReadOnlySpan<double> Next()
    {
        Array.Clear(_row);
        for (var i = 0; i < _states.Length; i++)
        {
            var (pole, drive) = _isRunning ? (_bank.Poles[i], _drives[i]) : (0, Math.Sqrt(_bank.Shares[i]));
            var states = _states[i];
            for (var noise = 0; noise < states.Length; noise++)
            {
                states[noise] = (pole * states[noise]) + (drive * _lots.Normal());
                _row[noise] += states[noise];
            }
        }

        _isRunning = true;
        return _row;
    }
}
