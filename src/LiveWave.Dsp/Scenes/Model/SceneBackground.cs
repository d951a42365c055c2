namespace LiveWave.Dsp;

/// <summary>Background of a scene: standard deviations over the whole spectrum, before gains.</summary>
public sealed record SceneBackground
{
    /// <summary>Local field, 1/f: correlated within a patch as exp(−distance / <see cref="LocalLengthMm"/>), independent between patches.</summary>
    public double LocalMicrovolts { get; init; }

    /// <summary>Length of that correlation, above 0; NaN: half the patch's aperture.</summary>
    public double LocalLengthMm { get; init; } = double.NaN;

    /// <summary>Common reference, 1/f: the same on all channels of the stream.</summary>
    public double CommonMicrovolts { get; init; }

    /// <summary>Contacts, 1/f: independent on each channel.</summary>
    public double ContactMicrovolts { get; init; }

    /// <summary>Sensor, white: independent on each channel.</summary>
    public double SensorMicrovolts { get; init; }

    /// <summary>The power of everything 1/f falls as frequency to the power of minus this, 0.5 to 1.8.</summary>
    public double Exponent { get; init; } = 1.2;

    /// <summary>Below this frequency it is flat; above 0, below a quarter of the rate.</summary>
    public double CornerHz { get; init; } = 0.5;
}
