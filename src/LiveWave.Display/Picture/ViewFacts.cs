using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>What a view shows and what doesn't change during a run. A view follows one wave track: that of the first rule.</summary>
internal sealed record ViewFacts
{
    public required StreamFormat Stream { get; init; }

    /// <summary>The calibration in a word or two.</summary>
    public required string CalibrationWord { get; init; }

    public required PatchSetup Patch { get; init; }

    public required Band Band { get; init; }

    /// <summary>The wave estimator's name.</summary>
    public required string Estimator { get; init; }

    /// <summary>Number of the band's track in the setup.</summary>
    public required int Track { get; init; }

    /// <summary>How many wave tracks the run has.</summary>
    public required int WaveTracks { get; init; }

    /// <summary>From which evidence on an event may begin, per sector of direction.</summary>
    public required IReadOnlyList<double> EnterBySector { get; init; }

    /// <summary>The rules that watch this wave track.</summary>
    public required IReadOnlyList<RuleSetup> Rules { get; init; }

    public required BudgetLimits Limits { get; init; }

    /// <summary>Pulses the session may use; null: not limited.</summary>
    public int? PulsesAllowed { get; init; }

    public static ViewFacts Of(RunSetup setup, BudgetLimits limits, string calibration, int? pulsesAllowed)
    {
        var waves = setup.Tracks.SelectMany((track, at) => track.Waves.Select(wave => (Track: at, wave.Estimator))).ToList();
        var shown = setup.Rules.Count > 0 ? setup.Rules[0].Track : 0;
        var track = setup.Tracks[waves[shown].Track];
        return new ViewFacts
        {
            Stream = setup.Format,
            CalibrationWord = calibration,
            Patch = setup.Patches[track.Patch],
            Band = track.Band,
            Estimator = waves[shown].Estimator,
            Track = waves[shown].Track,
            WaveTracks = waves.Count,
            EnterBySector = track.Calibration.ThresholdOf(WaveKind.Planar)?.EnterBySector ?? [Calibration.UncalibratedThreshold],
            Rules = [.. setup.Rules.Where(rule => rule.Track == shown)],
            Limits = limits,
            PulsesAllowed = pulsesAllowed,
        };
    }

    /// <summary>The threshold that holds for a direction; the lowest where there is none.</summary>
    /// <param name="degrees">Direction; NaN: none.</param>
    public double EnterAt(double degrees)
    {
        if (double.IsNaN(degrees)) return EnterBySector.Min();
        var sector = (int)Math.Round(degrees * EnterBySector.Count / 360, MidpointRounding.AwayFromZero);
        return EnterBySector[sector % EnterBySector.Count];
    }

    /// <summary>True if a rule wants this direction.</summary>
    /// <param name="degrees">Direction.</param>
    public bool IsWanted(double degrees)
    {
        foreach (var rule in Rules)
        {
            if (double.IsNaN(rule.DirectionDegrees)) return true;
            if (Math.Abs(Math.IEEERemainder(degrees - rule.DirectionDegrees, 360)) <= rule.ToleranceDegrees) return true;
        }

        return false;
    }
}
