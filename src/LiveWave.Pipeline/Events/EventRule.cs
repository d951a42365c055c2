using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>When a run of frames is a wave event.</summary>
internal sealed record EventRule
{
    private const double Hysteresis = 0.15;        // of |threshold|; safe for negative ones
    private const double Slack = 1e-9;             // of a frame: durations that are whole frames stay so
    private const double AnyDirectionDegrees = 180;

    /// <summary>Describes the rule.</summary>
    /// <param name="enterBySector">From which statistic on an event may begin: one per direction sector (sector 0 centred on 0°,
    /// counter-clockwise), or a single one.</param>
    /// <param name="frameRateHz">Frames a second, above 0.</param>
    /// <exception cref="RefusedException">No threshold, one that is not a number, or no rate.</exception>
    public EventRule(IReadOnlyList<double> enterBySector, double frameRateHz)
    {
        if (enterBySector.Count == 0 || enterBySector.Any(double.IsNaN))
        {
            throw new RefusedException("an event has no threshold", "", "give one number, or one a direction sector");
        }

        if (!(frameRateHz > 0) || !double.IsFinite(frameRateHz))
        {
            throw new RefusedException($"{frameRateHz} frames a second", "", "give a rate above 0 Hz");
        }

        EnterBySector = [.. enterBySector];
        FrameRateHz = frameRateHz;
    }

    /// <summary>From which statistic on an event may begin, one per direction sector.</summary>
    public IReadOnlyList<double> EnterBySector { get; }

    /// <summary>Frames a second.</summary>
    public double FrameRateHz { get; }

    /// <summary>How long a forming event must last before it may pass, ms.</summary>
    public double MinimumMs { get; init; } = 60;

    /// <summary>Over how long its direction must be steady, ms.</summary>
    public double StabilityMs { get; init; } = 60;

    /// <summary>Largest circular standard deviation of the direction over that time, degrees; 180 and more: not asked.</summary>
    public double StabilityDegrees { get; init; } = 25;

    /// <summary>How long frames may be missing or too weak within an event, ms.</summary>
    public double GapMs { get; init; } = 20;

    /// <summary>How long after an event the next may not begin, ms.</summary>
    public double RefractoryMs { get; init; } = 100;

    /// <summary>Fewest frames before an event may pass, its first counted.</summary>
    internal int MinimumFrames => Math.Max(1, Up(MinimumMs));

    /// <summary>Most frames over which the direction must be steady.</summary>
    internal int StabilityFrames => Math.Max(1, Up(StabilityMs));

    /// <summary>Most frames bridged.</summary>
    internal int GapFrames => Down(GapMs);

    /// <summary>Frames after the last one of an event that may not begin another.</summary>
    internal int RefractoryFrames => Down(RefractoryMs);

    /// <summary>Least resultant length of the directions: exp(−σ²/2) of a wrapped normal with the largest deviation; 0: not asked.</summary>
    internal double LeastResultant
    {
        get
        {
            if (StabilityDegrees >= AnyDirectionDegrees) return 0;
            var radians = StabilityDegrees * (Math.PI / 180);
            return Portable.Exp(-0.5 * radians * radians);
        }
    }

    /// <summary>Down to which statistic an event holds.</summary>
    /// <param name="enter">From which it may begin.</param>
    internal static double Stay(double enter) => enter - Hysteresis * Math.Abs(enter);

    private int Up(double ms) => (int)Math.Ceiling(ms * FrameRateHz / 1000 - Slack);

    private int Down(double ms) => (int)Math.Floor(ms * FrameRateHz / 1000 + Slack);
}
