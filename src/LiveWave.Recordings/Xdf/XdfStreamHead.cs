using System.Xml.Linq;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>What a file says of one of its streams before the first sample.</summary>
public sealed record XdfStreamHead
{
    /// <summary>The stream's name.</summary>
    public required string Name { get; init; }

    /// <summary>What it carries: <c>LFP</c>, <c>EEG</c>, <c>Markers</c>.</summary>
    public required string Type { get; init; }

    /// <summary>What tells it from other streams of that name.</summary>
    public string SourceId { get; init; } = "";

    /// <summary>Samples per second; 0: irregular.</summary>
    public double RateHz { get; init; }

    /// <summary>Number format; null: texts. <see cref="WireFormat.Int24"/> is not in the standard.</summary>
    public WireFormat? Wire { get; init; }

    /// <summary>The channels in sample order, at least one.</summary>
    public required IReadOnlyList<RecordedChannel> Channels { get; init; }

    /// <summary>Further elements of the description, as the standard or we name them.</summary>
    public IReadOnlyList<XElement> Notes { get; init; } = [];

    /// <summary>A stream of texts without a rate, one channel.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="sourceId">What tells it from others.</param>
    /// <param name="notes">Further elements of the description.</param>
    public static XdfStreamHead Markers(string name, string sourceId = "", IReadOnlyList<XElement>? notes = null) => new()
    {
        Name = name,
        Type = "Markers",
        SourceId = sourceId,
        Channels = [new RecordedChannel(name, "", 1, double.NaN, double.NaN)],
        Notes = notes ?? [],
    };
}
