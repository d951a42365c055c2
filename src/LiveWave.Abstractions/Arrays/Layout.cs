namespace LiveWave.Abstractions;

/// <summary>Electrode positions of one patch, in its channel order. Immutable.</summary>
/// <remarks>Positions are in the array's own frame, unrotated: estimators work there and turn what they report by
/// <see cref="RotationDegrees"/>, so that a turned layout turns directions by exactly that and changes nothing else.</remarks>
public sealed class Layout
{
    /// <summary>Describes a patch.</summary>
    /// <param name="electrodes">One per channel, in channel order, at least one; positions finite.</param>
    /// <param name="rotationDegrees">Counter-clockwise turn from the array's frame to the stated view.</param>
    /// <param name="seenFrom">The view, e.g. <c>above</c>.</param>
    /// <param name="axes">Names for directions; may be empty.</param>
    /// <exception cref="ArgumentException">A position is not finite, or there is no electrode.</exception>
    public Layout(
        IReadOnlyList<Electrode> electrodes, double rotationDegrees = 0, string seenFrom = "above", IReadOnlyList<NamedAxis>? axes = null)
    {
        ArgumentNullException.ThrowIfNull(electrodes);
        ArgumentOutOfRangeException.ThrowIfZero(electrodes.Count, nameof(electrodes));
        foreach (var electrode in electrodes)
        {
            if (!double.IsFinite(electrode.XMm) || !double.IsFinite(electrode.YMm))
            {
                throw new ArgumentException($"the position of {electrode.Channel} is not finite", nameof(electrodes));
            }
        }

        Electrodes = [.. electrodes];
        RotationDegrees = rotationDegrees;
        SeenFrom = seenFrom;
        Axes = axes is null ? [] : [.. axes];
    }

    /// <summary>One per channel, in channel order.</summary>
    public IReadOnlyList<Electrode> Electrodes { get; }

    /// <summary>Counter-clockwise turn from the array's frame to the stated view, degrees.</summary>
    public double RotationDegrees { get; }

    /// <summary>The view in which +x is right and +y is up.</summary>
    public string SeenFrom { get; }

    /// <summary>Names for directions.</summary>
    public IReadOnlyList<NamedAxis> Axes { get; }

    /// <summary>Channel numbers (within the patch) that may be used, ascending. Allocates.</summary>
    public int[] GoodChannels() => [.. Enumerable.Range(0, Electrodes.Count).Where(i => Electrodes[i].IsGood)];
}
