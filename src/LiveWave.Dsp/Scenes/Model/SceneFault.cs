namespace LiveWave.Dsp;

/// <summary>One fault of a scene.</summary>
public sealed record SceneFault
{
    /// <summary>What is wrong.</summary>
    public required SceneFaultKind Kind { get; init; }

    /// <summary>Labels of the channels; empty: all. Of a gap not used.</summary>
    public IReadOnlyList<string> Channels { get; init; } = [];

    /// <summary>From when on.</summary>
    public double OnsetSeconds { get; init; }

    /// <summary>How long; infinite: to the end.</summary>
    public double DurationSeconds { get; init; } = double.PositiveInfinity;

    /// <summary>Bad, dying: standard deviation of the noise. Saturation: the bound. Movement: root mean square at its height.</summary>
    public double Microvolts { get; init; } = double.NaN;
}
