using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display.Tests;

/// <summary>Twelve seconds of a session, written down: five waves, a wave that passes now, and what was decided about them.</summary>
internal static class ScriptedSession
{
    private const double Start = 5000;
    private const double End = 5012.4;
    private const double FrameSeconds = 0.004;
    private const double PitchMm = 0.4;
    private const double WavelengthMm = 2.4;

    private static readonly (double At, double Lasts, double Degrees, double Evidence, DecisionKind Kind, OutcomeKind Outcome)[] Waves =
    [
        (1.2, 0.5, 88, 40, DecisionKind.Hold, OutcomeKind.NothingDue),
        (3.1, 0.55, 157, 139, DecisionKind.Pulse, OutcomeKind.Rehearsed),
        (5.4, 0.3, 33, 60, DecisionKind.Hold, OutcomeKind.NothingDue),
        (7.8, 0.45, 130, 100, DecisionKind.Sham, OutcomeKind.Withheld),
        (9.9, 0.35, 150, 80, DecisionKind.Pulse, OutcomeKind.Late),
        (12.1, 0.3, 135, 120, DecisionKind.Pulse, OutcomeKind.Rehearsed),
    ];

    public static ViewFacts Facts { get; } = MakeFacts();

    public static SessionPicture Play()
    {
        var picture = new SessionPicture(Facts) { Gate = new GateGlance(GateState.Rehearsing, 2, "") };
        for (var frame = 0; frame <= (End - Start) / FrameSeconds; frame++) picture.Take(ReadingAt(Start + (frame * FrameSeconds)));
        for (var number = 0; number < Waves.Length; number++) Wave(picture, number);
        for (var block = 0; block < 620; block++)
        {
            picture.Take(new RunGlance(Start + (0.02 * (block + 1)), (150 + (block % 50)) * 1e-6, 20 * (block + 1), block < 300 ? 0 : 15, block < 300 ? 0 : 1, 20));
        }

        picture.Take(Crest());
        return picture;
    }

    /// <summary>A plane wave towards 135° with its crest across the array's middle; one channel invalid, one bridged.</summary>
    private static Phasors Crest()
    {
        var electrodes = Facts.Patch.Layout.Electrodes;
        var phasors = new Phasors(electrodes.Count);
        for (var i = 0; i < electrodes.Count; i++)
        {
            var along = ((electrodes[i].XMm - 1.4) * Math.Cos(0.75 * Math.PI)) + ((electrodes[i].YMm - 1.4) * Math.Sin(0.75 * Math.PI));
            phasors.Re[i] = 30 * Math.Cos(-2 * Math.PI * along / WavelengthMm);
            phasors.Im[i] = 30 * Math.Sin(-2 * Math.PI * along / WavelengthMm);
            phasors.Validity[i] = Validity.Observed;
        }

        phasors.Validity[10] = Validity.Invalid;
        phasors.Validity[30] = Validity.Bridged;
        return phasors;
    }

    private static Reading ReadingAt(double stamp)
    {
        var wave = Waves.FirstOrDefault(wave => stamp >= Start + wave.At && stamp < Start + wave.At + wave.Lasts);
        var reading = new Reading { At = At(stamp), Patch = "quill", Band = "beta", Estimator = "planar", IsValid = true, Kind = WaveKind.NotResolved };
        if (wave.Lasts <= 0) return reading;
        var rise = Math.Sin(Math.PI * (stamp - Start - wave.At) / wave.Lasts);
        return reading with
        {
            Kind = WaveKind.Planar,
            Statistic = -4 + (wave.Evidence * rise),
            DirectionDegrees = wave.Degrees,
            DirectionStandardErrorDegrees = 2.5,
            SlownessMiddle = 12.5,
            WavelengthMm = WavelengthMm,
            LocalFrequencyHz = 18.2,
        };
    }

    private static void Wave(SessionPicture picture, int number)
    {
        var wave = Waves[number];
        var isLast = number == Waves.Length - 1;
        var told = new WaveEvent
        {
            Number = number + 1,
            Patch = "quill",
            Band = "beta",
            Estimator = "planar",
            State = WaveEventState.Passing,
            Kind = WaveKind.Planar,
            Onset = At(Start + wave.At),
            Passed = At(Start + wave.At + 0.06),
            Last = At(Start + wave.At + 0.06),
            DirectionDegrees = wave.Degrees,
            DirectionStandardErrorDegrees = 2.5,
        };
        picture.Take(told);
        if (!isLast) picture.Take(told with { State = WaveEventState.Quiet, Last = At(Start + wave.At + wave.Lasts) });
        picture.Take(Verdict(number, told));
    }

    private static Verdict Verdict(int number, in WaveEvent wave)
    {
        var (kind, outcome) = (Waves[number].Kind, Waves[number].Outcome);
        var now = wave.Passed.StampSeconds;
        var due = kind == DecisionKind.Hold ? double.NaN : now + 0.02;
        var sent = outcome is OutcomeKind.Rehearsed or OutcomeKind.Withheld ? due + 0.00004 : double.NaN;
        var decision = new Decision
        {
            Number = number + 1,
            Rule = "toward-135",
            EventNumber = wave.Number,
            Kind = kind,
            Failed = kind == DecisionKind.Hold ? Condition.Direction : Condition.None,
            At = wave.Passed,
            Wave = WaveKind.Planar,
            DirectionDegrees = wave.DirectionDegrees,
            DueSeconds = due,
        };
        var stages = new StageStamps(now, now + 0.01, now + 0.0101, now + 0.01015, now + 0.01016, due, sent, double.NaN);
        return new Verdict(decision, new Outcome(decision.Number, "stimulator", outcome, stages, 0, 0));
    }

    private static RowInstant At(double stamp) => new((long)Math.Round((stamp - Start) * 1000), (long)Math.Round((stamp - Start) * 1000), stamp);

    private static ViewFacts MakeFacts()
    {
        var electrodes = (from row in Enumerable.Range(0, 8)
                          from column in Enumerable.Range(0, 8)
                          where row is not (0 or 7) || column is not (0 or 7)
                          select new Electrode($"r{row + 1}c{column + 1}", PitchMm * column, PitchMm * row, IsGood: (row, column) != (3, 5))).ToList();
        var layout = new Layout(electrodes, axes: [new NamedAxis("anterior", 0), new NamedAxis("left", 90)]);
        return new ViewFacts
        {
            Stream = new StreamFormat("Fenmarsh array", 1000, WireFormat.Float32, [.. electrodes.Select(electrode => new ChannelFormat(electrode.Channel, "microvolts"))]),
            CalibrationWord = "calibrated",
            Patch = new PatchSetup("quill", [.. Enumerable.Range(0, electrodes.Count)], layout),
            Band = new Band("beta", 14, 22, []),
            Estimator = "planar",
            Track = 0,
            WaveTracks = 1,
            EnterBySector = [-4],
            Rules =
            [
                new RuleSetup
                {
                    Name = "toward-135",
                    Track = 0,
                    Kind = WaveKind.Planar,
                    DirectionDegrees = 135,
                    ToleranceDegrees = 30,
                    LeadMs = 20,
                    RestMs = 1000,
                    Outputs = [0],
                },
            ],
            Limits = new BudgetLimits(),
            PulsesAllowed = 200,
        };
    }
}
