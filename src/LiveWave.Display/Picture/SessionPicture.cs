using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>What a view knows of a run: filled with what the surface told, shown by the panels. One thread, the view's.</summary>
internal sealed class SessionPicture
{
    /// <summary>How far back the rose looks.</summary>
    public const double RoseSeconds = 60;

    /// <summary>How far back the tide looks.</summary>
    public const double TideSeconds = 10;

    // Ten seconds of frames up to 1600 a second, and a minute of events no closer than the shortest there are.
    private const int EvidenceKept = 16 * 1024;
    private const int EventsKept = 1024;
    private const int VerdictsKept = 1024;
    private const double AmplitudeFade = 0.995;

    private readonly long[] _decided = new long[3];

    public SessionPicture(ViewFacts facts)
    {
        Facts = facts;
        Phases = new Phasors(facts.Patch.Channels.Count);
        Ledger = new LatencyLedger(facts.Limits);
    }

    public ViewFacts Facts { get; }

    /// <summary>Stamp of the first thing heard of; NaN before.</summary>
    public double FirstSeconds { get; private set; } = double.NaN;

    /// <summary>Stamp of the newest thing heard of; NaN before.</summary>
    public double NewestSeconds { get; private set; } = double.NaN;

    /// <summary>The newest reading of the wave track shown.</summary>
    public Reading Newest { get; private set; } = new();

    public RecentList<EvidencePoint> Evidence { get; } = new(EvidenceKept);

    /// <summary>Events of the wave track shown, each once, as it was told last.</summary>
    public RecentList<WaveEvent> Events { get; } = new(EventsKept);

    public RecentList<Verdict> Verdicts { get; } = new(VerdictsKept);

    /// <summary>The view's own count of what the run told: so nobody reads the run's while it writes.</summary>
    public LatencyLedger Ledger { get; }

    /// <summary>The newest warning or fault; a warning never hides a fault.</summary>
    public Status? Notice { get; private set; }

    public RunGlance Run { get; private set; }

    public GateGlance Gate { get; set; } = new(GateState.Disarmed, 0, "");

    /// <summary>What came faster than the view looked, and was not kept.</summary>
    public long Missed { get; set; }

    public Phasors Phases { get; }

    /// <summary>Whether <see cref="Phases"/> holds a frame.</summary>
    public bool HasPhases { get; private set; }

    /// <summary>The amplitude that counts as full: the largest of the last half minute, fading.</summary>
    public double FullAmplitude { get; private set; }

    /// <summary>An event passes.</summary>
    public bool IsPassing => Events.Count > 0 && Events[0].State == WaveEventState.Passing;

    public long CountOf(DecisionKind kind) => _decided[(int)kind];

    public void Take(in Reading reading)
    {
        if (!IsShown(reading.Patch, reading.Band, reading.Estimator)) return;
        Newest = reading;
        SeeStamp(reading.At.StampSeconds);
        Evidence.Add(new EvidencePoint(reading.At.StampSeconds, reading.Statistic - Facts.EnterAt(reading.DirectionDegrees)));
    }

    public void Take(in WaveEvent wave)
    {
        if (!IsShown(wave.Patch, wave.Band, wave.Estimator)) return;
        if (Events.Count > 0 && Events[0].Number == wave.Number) Events[0] = wave;
        else Events.Add(wave);
    }

    public void Take(in Verdict verdict)
    {
        if (Verdicts.Count == 0 || Verdicts[0].Decision.Number != verdict.Decision.Number) _decided[(int)verdict.Decision.Kind]++;
        Verdicts.Add(verdict);
        Ledger.Decision(verdict.Outcome.Stages);
        Ledger.Outcome(verdict.Outcome.Stages);
    }

    public void Take(in Status status)
    {
        if (status.Level == StatusLevel.Note) return;
        if (Notice is { Level: StatusLevel.Fault } && status.Level != StatusLevel.Fault) return;
        Notice = status;
    }

    public void Take(in RunGlance run)
    {
        Run = run;
        SeeStamp(run.StampSeconds);
        Ledger.Block(run.ComputingSeconds);
    }

    /// <summary>The newest frame's phasors, copied.</summary>
    public void Take(Phasors frame)
    {
        frame.Re.CopyTo(Phases.Re);
        frame.Im.CopyTo(Phases.Im);
        frame.Validity.CopyTo(Phases.Validity);
        HasPhases = true;
        var (sum, count) = (0.0, 0);
        for (var i = 0; i < Phases.ChannelCount; i++)
        {
            if (Phases.Validity[i] == Validity.Invalid) continue;
            sum += Math.Sqrt((Phases.Re[i] * Phases.Re[i]) + (Phases.Im[i] * Phases.Im[i]));
            count++;
        }

        FullAmplitude = Math.Max(FullAmplitude * AmplitudeFade, count == 0 ? 0 : sum / count);
    }

    private bool IsShown(string patch, string band, string estimator) =>
        patch == Facts.Patch.Name && band == Facts.Band.Name && estimator == Facts.Estimator;

    private void SeeStamp(double seconds)
    {
        if (double.IsNaN(FirstSeconds)) FirstSeconds = seconds;
        NewestSeconds = seconds;
    }
}
