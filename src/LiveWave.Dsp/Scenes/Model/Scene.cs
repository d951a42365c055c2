using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>A synthetic recording as it is asked for: arrays, background, events, faults. <see cref="SceneFeed"/> makes its samples.</summary>
/// <remarks>Amplitudes in microvolts are those before the channels' gains. Positions and directions are in each array's own frame, unrotated.
/// Times are seconds from the first sample.</remarks>
public sealed record Scene
{
    /// <summary>How it is called.</summary>
    public required string Name { get; init; }

    /// <summary>Keys every lot. The same scene and seed give the same samples on every machine.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>How long it lasts, above 0.</summary>
    public required double Seconds { get; init; }

    /// <summary>Samples per second, above 0.</summary>
    public double RateHz { get; init; } = 1000;

    /// <summary>Stamp of the first sample, seconds.</summary>
    public double FirstStampSeconds { get; init; } = 5000;

    /// <summary>Name of the stream of samples.</summary>
    public string StreamName { get; init; } = "scene array";

    /// <summary>How samples are written: <see cref="WireFormat.Int16"/> or <see cref="WireFormat.Float32"/>.</summary>
    public WireFormat Wire { get; init; } = WireFormat.Int16;

    /// <summary>With <see cref="WireFormat.Int16"/>: size of one count, above 0.</summary>
    public double MicrovoltsPerCount { get; init; } = 0.05;

    /// <summary>The band in which SNRs count; NaN edges: none, and no event may have an SNR.</summary>
    public double BandLowHz { get; init; } = double.NaN;

    /// <summary>Upper edge of that band, below half the rate.</summary>
    public double BandHighHz { get; init; } = double.NaN;

    /// <summary>The arrays, at least one; labels of channels differ across all of them.</summary>
    public required IReadOnlyList<ScenePatch> Patches { get; init; }

    /// <summary>Activity without waves.</summary>
    public SceneBackground Background { get; init; } = new();

    /// <summary>An ongoing rhythm that does not travel; null: none.</summary>
    public SceneRhythm? Rhythm { get; init; }

    /// <summary>Mains hum, a sine in phase on all channels: its frequency, Hz.</summary>
    public double MainsHz { get; init; } = 50;

    /// <summary>Amplitude of the hum; 0: none.</summary>
    public double HumMicrovolts { get; init; }

    /// <summary>What stays the same between two recordings of one rig.</summary>
    public SceneRig Rig { get; init; } = new();

    /// <summary>What happens when.</summary>
    public IReadOnlyList<SceneEvent> Events { get; init; } = [];

    /// <summary>What is wrong with the recording on purpose.</summary>
    public IReadOnlyList<SceneFault> Faults { get; init; } = [];

    /// <summary>Number of channels over all patches.</summary>
    public int ChannelCount => Patches.Sum(patch => patch.Layout.Electrodes.Count);

    /// <summary>Number of rows, lost ones included.</summary>
    public long RowCount => (long)Math.Round(Seconds * RateHz);
}
