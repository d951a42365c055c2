using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>What is known of one wave event.</summary>
internal readonly record struct EventTrace
{
    /// <summary>Its first frame.</summary>
    public long OnsetFrame { get; init; }

    /// <summary>The row of that frame.</summary>
    public RowInstant Onset { get; init; }

    /// <summary>The frame at which it began to pass; −1: it has not.</summary>
    public long PassedFrame { get; init; }

    /// <summary>The row of that frame.</summary>
    public RowInstant Passed { get; init; }

    /// <summary>Its last frame so far that was strong enough.</summary>
    public long LastFrame { get; init; }

    /// <summary>The row of that frame.</summary>
    public RowInstant Last { get; init; }

    /// <summary>Direction when it began to pass, degrees [0, 360); NaN before, and where it has none.</summary>
    public double DirectionDegrees { get; init; }

    /// <summary>Kind of its strongest frame so far.</summary>
    public WaveKind Kind { get; init; }

    /// <summary>Largest statistic so far.</summary>
    public double PeakEvidence { get; init; }

    /// <summary>Frames that were strong enough so far.</summary>
    public int Frames { get; init; }
}
