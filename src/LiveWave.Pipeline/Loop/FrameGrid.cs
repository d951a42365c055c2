namespace LiveWave.Pipeline;

/// <summary>When a frame is due: at the first row whose index div samples-per-frame differs from the previous row's.</summary>
/// <remarks>A grid on the sampling instants, so that neither block borders nor gaps move it.</remarks>
public sealed class FrameGrid
{
    private readonly long _samplesPerFrame;
    private long _last = long.MinValue;

    /// <summary>Makes a grid.</summary>
    /// <param name="samplesPerFrame">Rows of the stream as received between frames, at least 1: of the analysis rate, times the factor of decimation.</param>
    public FrameGrid(long samplesPerFrame)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(samplesPerFrame, 1);
        _samplesPerFrame = samplesPerFrame;
    }

    /// <summary>Asks for a row; rows come in order.</summary>
    /// <param name="index">The row's index.</param>
    /// <param name="frame">The frame's number.</param>
    public bool IsDue(long index, out long frame)
    {
        frame = index / _samplesPerFrame;
        if (frame == _last) return false;
        _last = frame;
        return true;
    }
}
