using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>The last directions of an event as unit vectors. No allocation after the start.</summary>
/// <param name="length">Most frames held.</param>
internal sealed class SteadyWindow(int length)
{
    private readonly double[] _cosine = new double[length];
    private readonly double[] _sine = new double[length];
    private readonly bool[] _isKnown = new bool[length];
    private int _held;
    private int _next;

    /// <summary>Length of the mean of the known unit vectors, 0 to 1; 0 where fewer than half of the frames have a direction.</summary>
    public double Length { get; private set; }

    /// <summary>Angle of that mean, degrees [0, 360); NaN where <see cref="Length"/> is 0.</summary>
    public double Degrees { get; private set; } = double.NaN;

    /// <summary>Holds nothing.</summary>
    public void Clear()
    {
        (_held, _next, Length, Degrees) = (0, 0, 0, double.NaN);
    }

    /// <summary>Adds a frame and drops what is too old.</summary>
    /// <param name="cosine">Of its direction; NaN where it has none.</param>
    /// <param name="sine">Of its direction.</param>
    public void Add(double cosine, double sine)
    {
        Put(cosine, sine);
        var (count, x, y) = (0, 0.0, 0.0);
        for (var i = 0; i < _held; i++)
        {
            var at = (_next + _cosine.Length - _held + i) % _cosine.Length;
            if (!_isKnown[at]) continue;
            count++;
            x += _cosine[at];
            y += _sine[at];
        }

        // Too weak a frame is often not read to the end and has no direction: the mean is over those that have one.
        Length = 2 * count >= _held && count > 0 ? Portable.Hypot(x, y) / count : 0;
        var degrees = Length > 0 ? Portable.Atan2(y, x) * (180 / Math.PI) : double.NaN;
        Degrees = degrees < 0 ? (degrees + 360 < 360 ? degrees + 360 : 0) : degrees;
    }

    /// <summary>Adds frames that are missing.</summary>
    /// <param name="count">How many.</param>
    public void AddMissing(long count)
    {
        for (var i = Math.Min(count, _cosine.Length); i > 0; i--) Put(double.NaN, double.NaN);
    }

    private void Put(double cosine, double sine)
    {
        (_cosine[_next], _sine[_next], _isKnown[_next]) = (cosine, sine, !double.IsNaN(cosine) && !double.IsNaN(sine));
        _next = (_next + 1) % _cosine.Length;
        if (_held < _cosine.Length) _held++;
    }
}
