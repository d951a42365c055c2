using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Plays a scene: makes its rows as they are asked for, as fast as it is asked. Pacing is the host's.</summary>
/// <remarks>Values are those that a file of the scene holds: whole counts times the size of a count, or single precision. The same bits on
/// every machine and for every block size. Rows lost by a fault are not delivered; stamps jump over them. One thread.</remarks>
public sealed class SceneFeed : IFeed
{
    private readonly Scene _scene;
    private readonly SceneNoise _noise;
    private readonly SiteDrive[] _events;
    private readonly FaultOnChannels[] _faults;
    private readonly double[] _gains;
    private readonly double[] _offsets;
    private readonly double[] _row;
    private int _firstOpen;
    private long _next;
    private long _received;

    /// <summary>Prepares a scene. Allocates; for the start of a run.</summary>
    /// <param name="scene">The scene.</param>
    /// <exception cref="RefusedException">An event or fault can't be made: a patch or channel that is not there, an SNR without a
    /// background, a shape without amplitude.</exception>
    public SceneFeed(Scene scene)
    {
        ArgumentNullException.ThrowIfNull(scene);
        _scene = scene;
        Format = FormatOf(scene);
        _noise = new SceneNoise(scene);
        BandMicrovolts = SceneNoise.BandMicrovolts(scene);
        Truth = TruthDraw.Of(scene, BandMicrovolts);
        _events = Drives(scene, Truth);
        _faults = [.. scene.Faults.Select((fault, i) => new FaultOnChannels(fault, scene.RateHz, Numbers(fault), new SceneLots(scene.Seed, "fault", "", i)))];
        var rigSeed = scene.Rig.Seed ?? scene.Seed;
        _gains = PerChannel("gain", lots => Portable.Exp(scene.Rig.GainLogSd * lots.Normal()), rigSeed);
        _offsets = PerChannel("offset", lots => scene.Rig.OffsetMicrovolts * lots.Normal(), rigSeed);
        _row = new double[Format.ChannelCount];
    }

    /// <inheritdoc/>
    public StreamFormat Format { get; }

    /// <summary>Every event that happens, in order of its onset.</summary>
    public IReadOnlyList<SceneTruth> Truth { get; }

    /// <summary>What SNRs are measured against: root mean square of the modulus of the background's analytic signal in the scene's band
    /// (ideal edges), mean power over channels, before gains, without hum; 0 where the scene has no band or no background.</summary>
    public double BandMicrovolts { get; }

    /// <summary>Rows made so far, lost ones included.</summary>
    public long RowsMade => _next;

    /// <summary>How many of them were lost by a fault.</summary>
    public long RowsLost => _next - _received;

    /// <inheritdoc/>
    public PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        ArgumentNullException.ThrowIfNull(into);
        into.Begin(_received);
        while (into.Count < into.Capacity && _next < _scene.RowCount)
        {
            var seconds = _next / _scene.RateHz;
            Make(seconds);
            if (IsLost(_next++)) continue;
            var row = into.Append(_scene.FirstStampSeconds + seconds);
            for (var i = 0; i < row.Length; i++) row[i] = AsWritten(_row[i]);
            _received++;
        }

        return into.Count > 0 ? PullResult.Samples : PullResult.Ended;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
    }

    private static StreamFormat FormatOf(Scene scene)
    {
        var scale = scene.Wire == WireFormat.Int16 ? scene.MicrovoltsPerCount : 1;
        var channels = scene.Patches
            .SelectMany(patch => patch.Layout.Electrodes)
            .Select(electrode => new ChannelFormat(electrode.Channel, "microvolts", scale))
            .ToArray();
        return new StreamFormat(scene.StreamName, scene.RateHz, scene.Wire, channels);
    }

    private static SiteDrive[] Drives(Scene scene, IReadOnlyList<SceneTruth> truths)
    {
        var places = new Dictionary<string, (PatchGeometry Geometry, int First)>(StringComparer.Ordinal);
        var first = 0;
        foreach (var patch in scene.Patches)
        {
            places.Add(patch.Name, (new PatchGeometry(patch.Layout), first));
            first += patch.Layout.Electrodes.Count;
        }

        return
        [
            .. truths
                .Select(truth => new SiteDrive(truth, places[truth.Event.Patch].Geometry, places[truth.Event.Patch].First))
                .OrderBy(drive => drive.StartSeconds),
        ];
    }

    private double[] PerChannel(string part, Func<SceneLots, double> draw, ulong seed) =>
        [.. Format.Channels.Select(channel => draw(new SceneLots(seed, part, channel.Label)))];

    private int[] Numbers(SceneFault fault)
    {
        if (fault.Channels.Count == 0) return [.. Enumerable.Range(0, Format.ChannelCount)];
        var labels = Format.Channels.Select(channel => channel.Label).ToList();
        return
        [
            .. fault.Channels.Select(label => labels.IndexOf(label) is var at and >= 0
                ? at
                : throw new RefusedException($"there is no channel '{label}'", _scene.Name, "name channels of the scene")),
        ];
    }

    private void Make(double seconds)
    {
        _noise.Next(_next, _row);
        for (var i = _firstOpen; i < _events.Length && _events[i].StartSeconds <= seconds; i++)
        {
            if (i == _firstOpen && _events[i].EndSeconds < seconds) _firstOpen++;
            else _events[i].Add(seconds, _row);
        }

        for (var i = 0; i < _row.Length; i++) _row[i] = (_gains[i] * _row[i]) + _offsets[i];
        foreach (var fault in _faults) fault.Apply(_next, _row);
    }

    private bool IsLost(long number)
    {
        foreach (var fault in _faults)
        {
            if (fault.Loses(number)) return true;
        }

        return false;
    }

    private double AsWritten(double value) => _scene.Wire == WireFormat.Int16
        ? Math.Clamp(Math.Round(value / _scene.MicrovoltsPerCount), short.MinValue, short.MaxValue) * _scene.MicrovoltsPerCount
        : (float)value;
}
