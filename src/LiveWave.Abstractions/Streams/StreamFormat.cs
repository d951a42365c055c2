namespace LiveWave.Abstractions;

/// <summary>Rate and channels of a regularly sampled stream. Immutable.</summary>
public sealed class StreamFormat
{
    /// <summary>Describes a stream.</summary>
    /// <param name="name">The stream's own name.</param>
    /// <param name="nominalRateHz">Samples per second, above 0.</param>
    /// <param name="wire">Number format as received.</param>
    /// <param name="channels">At least one, in sample order.</param>
    /// <exception cref="ArgumentOutOfRangeException">The rate is not a finite number above 0 Hz, or there is no channel.</exception>
    public StreamFormat(string name, double nominalRateHz, WireFormat wire, IReadOnlyList<ChannelFormat> channels)
    {
        ArgumentNullException.ThrowIfNull(channels);
        if (!double.IsFinite(nominalRateHz) || nominalRateHz <= 0)
        {
            throw new ArgumentOutOfRangeException(nameof(nominalRateHz), nominalRateHz, "a rate is a finite number above 0 Hz");
        }

        ArgumentOutOfRangeException.ThrowIfZero(channels.Count, nameof(channels));
        Name = name;
        NominalRateHz = nominalRateHz;
        Wire = wire;
        Channels = [.. channels];
    }

    /// <summary>The stream's own name.</summary>
    public string Name { get; }

    /// <summary>Samples per second.</summary>
    public double NominalRateHz { get; }

    /// <summary>Number format as received.</summary>
    public WireFormat Wire { get; }

    /// <summary>The channels in sample order.</summary>
    public IReadOnlyList<ChannelFormat> Channels { get; }

    /// <summary>Number of channels, at least 1.</summary>
    public int ChannelCount => Channels.Count;

    /// <summary>The same stream with only some channels, in the order given. Allocates.</summary>
    /// <param name="channels">Zero-based channel numbers of this format.</param>
    public StreamFormat Select(ReadOnlySpan<int> channels)
    {
        var chosen = new ChannelFormat[channels.Length];
        for (var i = 0; i < channels.Length; i++) chosen[i] = Channels[channels[i]];
        return new StreamFormat(Name, NominalRateHz, Wire, chosen);
    }

    /// <summary>The same channels at another rate, as a decimating conditioner delivers them.</summary>
    /// <param name="rateHz">Samples per second, above 0.</param>
    public StreamFormat AtRate(double rateHz) => new(Name, rateHz, Wire, Channels);
}
