using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>What an event turned out to be, everything drawn by lot included. Values that are drawn are rounded as truth tables print them, so
/// that a table is exact. NaN: not known, or has no meaning for the kind.</summary>
public sealed record SceneTruth
{
    /// <summary>The event of the scene that it comes from.</summary>
    public required SceneEvent Event { get; init; }

    /// <summary>Where the first flank begins, from the first sample, where the delay is the patch's mean.</summary>
    public required double OnsetSeconds { get; init; }

    /// <summary>Frequency.</summary>
    public required double FrequencyHz { get; init; }

    /// <summary>Phase at the onset where the delay is the mean.</summary>
    public required double PhaseRadians { get; init; }

    /// <summary>Direction, 0 to 360, as <see cref="SceneEvent.DirectionDegrees"/>.</summary>
    public required double DirectionDegrees { get; init; }

    /// <summary>Wavelength.</summary>
    public required double WavelengthMm { get; init; }

    /// <summary>Wavelength over the patch's aperture.</summary>
    public required double WavelengthApertures { get; init; }

    /// <summary>Speed of a kind that travels.</summary>
    public required double SpeedMetresPerSecond { get; init; }

    /// <summary>Centre, in the patch's frame; planar and synchronous have none.</summary>
    public required double CentreXMm { get; init; }

    /// <summary>The other coordinate.</summary>
    public required double CentreYMm { get; init; }

    /// <summary>Mean power over the patch against the background's in the band.</summary>
    public required double SnrDecibels { get; init; }

    /// <summary>Amplitude, of a field with a shape its root mean square over the patch.</summary>
    public required double AmplitudeMicrovolts { get; init; }

    /// <summary>Stands out: a planar wave of 6 dB or more, up to two apertures long.</summary>
    public bool IsStrong => Event.Kind == WaveKind.Planar && SnrDecibels >= 6 && WavelengthApertures <= 2;
}
