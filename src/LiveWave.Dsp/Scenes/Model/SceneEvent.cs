using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>An event of a scene, or a series of like ones. NaN is 'not given'.</summary>
/// <remarks>Mechanism: one oscillator drives the sites with growing delays, its flanks too. Onset and duration hold where the delay is
/// the mean over the patch. Delay τ at frequency f is a lag of 360·f·τ degrees.</remarks>
public sealed record SceneEvent
{
    /// <summary>Name of the patch.</summary>
    public required string Patch { get; init; }

    /// <summary>Any kind but <see cref="WaveKind.Front"/>, <see cref="WaveKind.NotResolved"/> and <see cref="WaveKind.None"/>.</summary>
    public required WaveKind Kind { get; init; }

    /// <summary>Where the first flank begins.</summary>
    public required double OnsetSeconds { get; init; }

    /// <summary>To the end of the other flank, above 0.</summary>
    public required double DurationSeconds { get; init; }

    /// <summary>Length of the raised-cosine flanks, at least 0.</summary>
    public double FlankMs { get; init; } = 30;

    /// <summary>Frequency, constant while it lasts.</summary>
    public required double FrequencyHz { get; init; }

    /// <summary>Phase at the onset where the delay is the mean; NaN: by lot.</summary>
    public double PhaseDegrees { get; init; } = double.NaN;

    /// <summary>Mean power of the event over the patch against that of the background's analytic signal in the scene's band.</summary>
    public double SnrDecibels { get; init; } = double.NaN;

    /// <summary>Amplitude in place of an SNR; of a field with a shape its root mean square over the patch.</summary>
    public double AmplitudeMicrovolts { get; init; } = double.NaN;

    /// <summary>Planar: where it travels. Standing: across the nodes. In phase: along the shape. Counter-clockwise from +x.</summary>
    public double DirectionDegrees { get; init; } = double.NaN;

    /// <summary>Planar, expanding, contracting: speed, or give the wavelength.</summary>
    public double SpeedMetresPerSecond { get; init; } = double.NaN;

    /// <summary>Planar, expanding, contracting, standing: wavelength.</summary>
    public double WavelengthMm { get; init; } = double.NaN;

    /// <summary>Rotating, expanding, contracting, standing (a belly), in phase: the centre; NaN: the mean of the electrodes' positions.</summary>
    public double CentreXMm { get; init; } = double.NaN;

    /// <summary>The other coordinate of the centre.</summary>
    public double CentreYMm { get; init; } = double.NaN;

    /// <summary>In phase: the shape.</summary>
    public SceneShape Shape { get; init; }

    /// <summary>How many such events, at least 1.</summary>
    public int Repeats { get; init; } = 1;

    /// <summary>From onset to onset of a series.</summary>
    public double EverySeconds { get; init; } = double.NaN;

    /// <summary>Each onset of a series moves by lot, evenly, by up to this much to either side.</summary>
    public double EverySpreadSeconds { get; init; }

    /// <summary>Each direction is drawn evenly, up to this much to either side; 180: any.</summary>
    public double DirectionSpreadDegrees { get; init; }

    /// <summary>Each SNR is drawn evenly, up to this much to either side.</summary>
    public double SnrSpreadDecibels { get; init; }

    /// <summary>Each frequency is drawn evenly, up to this much to either side.</summary>
    public double FrequencySpreadHz { get; init; }
}
