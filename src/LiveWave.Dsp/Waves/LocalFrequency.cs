using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Median over channels of the phase's advance since the last frame. No allocation after the start.</summary>
/// <param name="channelCount">Number of good channels.</param>
/// <param name="rateHz">Rows a second.</param>
/// <param name="highHz">Upper edge of the band: beyond half its period a phase step can't be told from a shorter one.</param>
internal sealed class LocalFrequency(int channelCount, double rateHz, double highHz)
{
    private readonly double[] _lastRe = new double[channelCount];
    private readonly double[] _lastIm = new double[channelCount];
    private readonly double[] _advance = new double[channelCount];
    private long _lastIndex;
    private bool _hasLast;

    /// <summary>Takes a frame.</summary>
    /// <param name="at">Its row.</param>
    /// <param name="frame">The frame; missing channels hold 0.</param>
    /// <returns>Hz; NaN at the first frame, after too long a gap, or where no channel was there twice.</returns>
    public double Next(RowInstant at, WhitenedFrame frame)
    {
        var steps = at.Index - _lastIndex;
        var seconds = steps / rateHz;
        var isClose = _hasLast && steps > 0 && (at.Breaks & RowBreaks.Restart) == 0 && seconds * highHz <= 0.5;
        var hertz = isClose ? Median(frame) / (2 * Math.PI * seconds) : double.NaN;
        frame.Re.CopyTo(_lastRe);
        frame.Im.CopyTo(_lastIm);
        (_lastIndex, _hasLast) = (at.Index, true);
        return hertz;
    }

    /// <summary>As new.</summary>
    public void Reset() => _hasLast = false;

    private double Median(WhitenedFrame frame)
    {
        var re = frame.Re;
        var im = frame.Im;
        var count = 0;
        for (var i = 0; i < re.Length; i++)
        {
            var cosine = re[i] * _lastRe[i] + im[i] * _lastIm[i];
            var sine = im[i] * _lastRe[i] - re[i] * _lastIm[i];
            if (cosine != 0 || sine != 0) _advance[count++] = Portable.Atan2(sine, cosine);
        }

        if (count == 0) return double.NaN;
        var sorted = _advance.AsSpan(0, count);
        sorted.Sort();
        return 0.5 * (sorted[count / 2] + sorted[(count - 1) / 2]);
    }
}
