using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>Synthetic rows that hold strong planar waves, one after the other, in directions that the rules want and do not want.</summary>
/// <remarks>Only to exercise a clone of the run before the first real block; deterministic.</remarks>
public sealed class WarmupFeed : IFeed
{
    private const double WavelengthApertures = 1.5;
    private const double AmplitudeRms = 4;
    private readonly RunSetup _setup;
    private readonly double[] _cosine;
    private readonly double[] _sine;
    private readonly double[] _amplitude;
    private readonly int _onRows;
    private readonly int _offRows;
    private long _row;
    private double _radiansPerRow;

    /// <summary>Makes the feed.</summary>
    /// <param name="setup">The run: its layouts, bands and rules shape the waves.</param>
    public WarmupFeed(RunSetup setup)
    {
        ArgumentNullException.ThrowIfNull(setup);
        _setup = setup;
        var channels = setup.Format.ChannelCount;
        _cosine = new double[channels];
        _sine = new double[channels];
        _amplitude = new double[channels];
        var narrowestHz = setup.Tracks.Min(track => track.Band.HighHz - track.Band.LowHz);
        _onRows = (int)(setup.Format.NominalRateHz * (0.07 + (1.2 / narrowestHz)));
        _offRows = (int)(setup.Format.NominalRateHz * (0.12 + (1.0 / narrowestHz)));
    }

    /// <inheritdoc/>
    public StreamFormat Format => _setup.Format;

    /// <inheritdoc/>
    public PullResult Pull(SampleBlock into, TimeSpan atMost)
    {
        into.Begin(_row);
        for (var i = 0; i < into.Capacity; i++, _row++)
        {
            var within = (int)(_row % (_onRows + _offRows));
            if (within == 0) Shape(_row / (_onRows + _offRows));
            Fill(into.Append(_row / Format.NominalRateHz), within);
        }

        return PullResult.Samples;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
    }

    private void Shape(long wave)
    {
        var track = _setup.Tracks[(int)(wave % _setup.Tracks.Count)];
        var patch = _setup.Patches[track.Patch];
        var direction = (DirectionFor(wave) - patch.Layout.RotationDegrees) * Math.PI / 180;
        var (sine, cosine) = Portable.SinCos(direction);
        var electrodes = patch.Layout.Electrodes;
        var aperture = Math.Max(
            electrodes.Max(e => e.XMm) - electrodes.Min(e => e.XMm), electrodes.Max(e => e.YMm) - electrodes.Min(e => e.YMm));
        var wavenumber = 2 * Math.PI / (WavelengthApertures * Math.Max(aperture, 1e-6));
        _radiansPerRow = 2 * Math.PI * track.Band.CentreHz / Format.NominalRateHz;
        _amplitude.AsSpan().Clear();
        for (var i = 0; i < electrodes.Count; i++)
        {
            var lag = wavenumber * ((electrodes[i].XMm * cosine) + (electrodes[i].YMm * sine));
            var channel = patch.Channels[i];
            (_sine[channel], _cosine[channel]) = Portable.SinCos(lag);
            _amplitude[channel] = AmplitudeRms * (track.Calibration.ChannelRms.Count > i ? track.Calibration.ChannelRms[i] : 1);
        }
    }

    private double DirectionFor(long wave)
    {
        if (_setup.Rules.Count == 0) return 45 * (wave % 8);
        var rule = _setup.Rules[(int)(wave / 3 % _setup.Rules.Count)];
        var wanted = double.IsNaN(rule.DirectionDegrees) ? 45 * (wave % 8) : rule.DirectionDegrees;
        return wave % 3 == 2 ? wanted + 180 : wanted;   // two towards the rule, one away: pulses, shams and holds alike
    }

    private void Fill(Span<double> row, int within)
    {
        var (sine, cosine) = Portable.SinCos(_radiansPerRow * within);
        var envelope = within < _onRows ? 1.0 : 0.0;
        for (var i = 0; i < row.Length; i++)
        {
            var wave = envelope * ((cosine * _cosine[i]) + (sine * _sine[i]));
            row[i] = _amplitude[i] * (wave + (1.5 * Noise(i)));   // without noise a filter's ringing would hold the event until the next
        }
    }

    private double Noise(int channel)
    {
        var bits = ((ulong)_row * 0x9E3779B97F4A7C15) ^ ((ulong)(channel + 1) * 0xC2B2AE3D27D4EB4F);
        bits = (bits ^ (bits >> 30)) * 0xBF58476D1CE4E5B9;
        bits = (bits ^ (bits >> 27)) * 0x94D049BB133111EB;
        return ((double)(bits >> 11) / (1UL << 52)) - 1;
    }
}
