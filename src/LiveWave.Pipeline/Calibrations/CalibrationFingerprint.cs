using System.Globalization;

namespace LiveWave.Pipeline;

/// <summary>What a calibration was made with, in clear text, so that a run can be compared with it field by field. A run whose own
/// fingerprint differs must not use the calibration.</summary>
public sealed record CalibrationFingerprint
{
    /// <summary>Positions nearer than this are the same place, mm: far below any electrode, far above the rounding of a text file.</summary>
    public const double SamePlaceMm = 1e-6;

    /// <summary>Labels of the good channels, in order.</summary>
    public required IReadOnlyList<string> Channels { get; init; }

    /// <summary>Their positions in the array's own frame, mm.</summary>
    public required IReadOnlyList<(double XMm, double YMm)> PositionsMm { get; init; }

    /// <summary>Rate of the stream, Hz.</summary>
    public required double RateHz { get; init; }

    /// <summary>Lower edge of the band, Hz.</summary>
    public required double LowHz { get; init; }

    /// <summary>Upper edge of the band, Hz.</summary>
    public required double HighHz { get; init; }

    /// <summary>The conditioners in order, each with its options in words; may be empty.</summary>
    public required IReadOnlyList<string> Conditioning { get; init; }

    /// <summary>Name of the phase estimator, with its options.</summary>
    public required string PhaseEstimator { get; init; }

    /// <summary>Name of the wave estimator, with its options.</summary>
    public required string WaveEstimator { get; init; }

    /// <summary>Rows from frame to frame, counted at the analysis rate.</summary>
    public required int SamplesPerFrame { get; init; }

    /// <summary>The event settings.</summary>
    public required EventPrint Event { get; init; }

    /// <summary>Compares a calibration's fingerprint with a run's.</summary>
    /// <param name="run">The run's own.</param>
    /// <returns>One sentence for each field that differs, with both values: the calibration's, then the run's. Empty if the calibration
    /// fits.</returns>
    public IReadOnlyList<string> Differences(CalibrationFingerprint run)
    {
        ArgumentNullException.ThrowIfNull(run);
        var found = new List<string>();
        CompareChannels(run, found);
        ComparePositions(run, found);
        Compare(found, "the rate", RateHz, run.RateHz, " Hz");
        Compare(found, "the band's lower edge", LowHz, run.LowHz, " Hz");
        Compare(found, "the band's upper edge", HighHz, run.HighHz, " Hz");
        CompareConditioning(run, found);
        Compare(found, "the phase estimator", PhaseEstimator, run.PhaseEstimator);
        Compare(found, "the wave estimator", WaveEstimator, run.WaveEstimator);
        Compare(found, "the distance of frames", SamplesPerFrame, run.SamplesPerFrame, " samples");
        Compare(found, "the event's shortest duration", Event.MinimumMs, run.Event.MinimumMs, " ms");
        Compare(found, "the event's stability time", Event.StabilityMs, run.Event.StabilityMs, " ms");
        Compare(found, "the event's stability", Event.StabilityDegrees, run.Event.StabilityDegrees, " degrees");
        Compare(found, "the event's longest gap", Event.GapMs, run.Event.GapMs, " ms");
        Compare(found, "the event's refractory time", Event.RefractoryMs, run.Event.RefractoryMs, " ms");
        return found;
    }

    private void CompareChannels(CalibrationFingerprint run, List<string> found)
    {
        Compare(found, "the number of good channels", Channels.Count, run.Channels.Count, "");
        var differing = 0;
        var first = -1;
        for (var i = 0; i < Channels.Count && i < run.Channels.Count; i++)
        {
            if (Channels[i] == run.Channels[i]) continue;
            if (differing++ == 0) first = i;
        }

        if (differing == 0) return;
        found.Add($"good channel {first + 1} is {Quoted(Channels[first])} in the calibration and {Quoted(run.Channels[first])} in this run"
            + Others(differing));
    }

    private void ComparePositions(CalibrationFingerprint run, List<string> found)
    {
        if (Channels.Count != run.Channels.Count) return;      // said already; the places can't be compared
        var differing = 0;
        var first = -1;
        for (var i = 0; i < PositionsMm.Count && i < run.PositionsMm.Count; i++)
        {
            if (IsSamePlace(PositionsMm[i], run.PositionsMm[i])) continue;
            if (differing++ == 0) first = i;
        }

        if (differing == 0) return;
        found.Add($"the position of {Quoted(Channels[first])} is {Place(PositionsMm[first])} in the calibration and "
            + $"{Place(run.PositionsMm[first])} in this run" + Others(differing));
    }

    private void CompareConditioning(CalibrationFingerprint run, List<string> found)
    {
        if (Conditioning.SequenceEqual(run.Conditioning, StringComparer.Ordinal)) return;
        found.Add($"the conditioning is {Chain(Conditioning)} in the calibration and {Chain(run.Conditioning)} in this run");
    }

    private static void Compare(List<string> found, string what, double calibration, double run, string unit)
    {
        if (calibration.Equals(run)) return;
        found.Add($"{what} is {Number(calibration)}{unit} in the calibration and {Number(run)}{unit} in this run");
    }

    private static void Compare(List<string> found, string what, string calibration, string run)
    {
        if (calibration == run) return;
        found.Add($"{what} is {Quoted(calibration)} in the calibration and {Quoted(run)} in this run");
    }

    private static bool IsSamePlace((double XMm, double YMm) a, (double XMm, double YMm) b) =>
        Math.Abs(a.XMm - b.XMm) <= SamePlaceMm && Math.Abs(a.YMm - b.YMm) <= SamePlaceMm;

    private static string Others(int differing) => differing == 1 ? "" : $", and {differing - 1} more differ";

    private static string Chain(IReadOnlyList<string> conditioning) =>
        conditioning.Count == 0 ? "none" : Quoted(string.Join(", then ", conditioning));

    private static string Quoted(string text) => $"'{CalibrationNode.Plain(text)}'";

    private static string Place((double XMm, double YMm) at) => $"({Number(at.XMm)}, {Number(at.YMm)}) mm";

    private static string Number(double value) => value.ToString(CultureInfo.InvariantCulture);
}
