namespace LiveWave.Dsp;

/// <summary>Real part, variance 1, of a complex first-order process: a rhythm that waxes and wanes by itself. Stationary from the start.</summary>
internal sealed class Oscillator
{
    private readonly SceneLots _lots;
    private readonly double _re;
    private readonly double _im;
    private readonly double _drive;
    private double _x;
    private double _y;
    private bool _isRunning;

    public Oscillator(double frequencyHz, double widthHz, double rateHz, SceneLots lots)
    {
        _lots = lots;
        var pole = PoleOf(widthHz, rateHz);
        var (sine, cosine) = Portable.SinCos(2 * Math.PI * frequencyHz / rateHz);
        (_re, _im) = (pole * cosine, pole * sine);
        _drive = Math.Sqrt(1 - (pole * pole));
    }

    /// <summary>Modulus of the pole whose line is as wide as asked.</summary>
    public static double PoleOf(double widthHz, double rateHz) => Portable.Exp(-Math.PI * widthHz / rateHz);

    public double Next()
    {
        var drive = _isRunning ? _drive : 1;
        (_x, _y) = ((_re * _x) - (_im * _y) + (drive * _lots.Normal()), (_re * _y) + (_im * _x) + (drive * _lots.Normal()));
        _isRunning = true;
        return _x;
    }
}
