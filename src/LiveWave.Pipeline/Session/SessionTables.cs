using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The tables of a session folder: events, decisions, outcomes, clock. Written by one thread.</summary>
/// <remarks><c>decisions.tsv</c> and <c>events.tsv</c> hold nothing that depends on clock, block size or outcome; a re-run of the
/// same recording gives the same bytes.</remarks>
public sealed class SessionTables : IDisposable
{
    private readonly TableFile _events;
    private readonly TableFile _decisions;
    private readonly TableFile _outcomes;
    private readonly TableFile _clock;
    private readonly TableFile[] _all;

    /// <summary>Creates the files.</summary>
    /// <param name="folder">Where.</param>
    public SessionTables(SessionFolder folder)
    {
        ArgumentNullException.ThrowIfNull(folder);
        _events = new TableFile(
            folder.At("events.tsv"),
            "onset", "duration", "trial_type", "event", "patch", "band", "estimator", "passed", "direction_degrees",
            "direction_standard_error_degrees", "wavelength_millimetres", "slowness_seconds_per_metre", "slowness_low", "slowness_high",
            "frequency_hertz", "peak_evidence", "frames", "onset_received", "onset_index");
        _decisions = new TableFile(
            folder.At("decisions.tsv"),
            "decision", "rule", "event", "patch", "band", "what", "failed_condition", "received", "index", "stamp_seconds",
            "onset_received", "wave", "direction_degrees", "direction_standard_error_degrees", "evidence", "due_seconds", "code",
            "lot", "predicted_phase_degrees");
        _outcomes = new TableFile(
            folder.At("outcomes.tsv"),
            "decision", "output", "outcome", "acquired_seconds", "received_seconds", "phased_seconds", "read_seconds",
            "decided_seconds", "due_seconds", "sent_seconds", "echoed_seconds", "late_ms", "collections", "pause_ms");
        _clock = new TableFile(
            folder.At("clock.tsv"),
            "what", "from_received", "known_at_seconds", "remote_seconds", "offset_seconds", "uncertainty_seconds", "block_rows");
        _all = [_events, _decisions, _outcomes, _clock];
    }

    /// <summary>Adds a wave event that is over.</summary>
    /// <param name="wave">The event.</param>
    /// <param name="firstStampSeconds">Stamp of the run's first row: onsets count from there.</param>
    public void Add(in WaveEvent wave, double firstStampSeconds) => _events.Add(
        Cell.Number(wave.Onset.StampSeconds - firstStampSeconds, 6),
        Cell.Number(wave.Last.StampSeconds - wave.Onset.StampSeconds, 6),
        WaveKinds.Word(wave.Kind),
        Cell.Whole(wave.Number),
        Cell.Text(wave.Patch),
        Cell.Text(wave.Band),
        Cell.Text(wave.Estimator),
        Cell.Number(wave.Passed.StampSeconds - firstStampSeconds, 6),
        Cell.Number(wave.DirectionDegrees, 2),
        Cell.Number(wave.DirectionStandardErrorDegrees, 2),
        Cell.Number(wave.WavelengthMm, 3),
        Cell.Number(wave.SlownessMiddle, 3),
        Cell.Number(wave.SlownessLow, 3),
        Cell.Number(wave.SlownessHigh, 3),
        Cell.Number(wave.FrequencyHz, 3),
        Cell.Number(wave.PeakEvidence, 3),
        Cell.Whole(wave.Frames),
        Cell.Whole(wave.Onset.Received),
        Cell.Whole(wave.Onset.Index));

    /// <summary>Adds a decision.</summary>
    /// <param name="decision">The decision.</param>
    public void Add(in Decision decision) => _decisions.Add(
        Cell.Whole(decision.Number),
        Cell.Text(decision.Rule),
        Cell.Whole(decision.EventNumber),
        Cell.Text(decision.Patch),
        Cell.Text(decision.Band),
        DecisionWords.What(decision.Kind),
        DecisionWords.Failed(decision.Failed),
        Cell.Whole(decision.At.Received),
        Cell.Whole(decision.At.Index),
        Cell.Number(decision.At.StampSeconds, 6),
        Cell.Whole(decision.Onset.Received),
        WaveKinds.Word(decision.Wave),
        Cell.Number(decision.DirectionDegrees, 3),
        Cell.Number(decision.DirectionStandardErrorDegrees, 3),
        Cell.Number(decision.Evidence, 4),
        Cell.Number(decision.DueSeconds, 6),
        Cell.Whole(decision.Code),
        Cell.Number(decision.Lot, 9),
        Cell.Number(decision.PredictedPhaseDegrees, 3));

    /// <summary>Adds an outcome.</summary>
    /// <param name="outcome">The outcome.</param>
    public void Add(in Outcome outcome)
    {
        var at = outcome.Stages;
        _outcomes.Add(
            Cell.Whole(outcome.Decision),
            Cell.Text(outcome.Output),
            DecisionWords.Outcome(outcome.Kind),
            Cell.Number(at.AcquiredSeconds, 6),
            Cell.Number(at.ReceivedSeconds, 6),
            Cell.Number(at.PhasedSeconds, 6),
            Cell.Number(at.ReadSeconds, 6),
            Cell.Number(at.DecidedSeconds, 6),
            Cell.Number(at.DueSeconds, 6),
            Cell.Number(at.SentSeconds, 6),
            Cell.Number(at.EchoedSeconds, 6),
            Cell.Number((at.SentSeconds - at.DueSeconds) * 1000, 3),
            Cell.Whole(outcome.Collections),
            Cell.Number(outcome.PauseSeconds * 1000, 3));
    }

    /// <summary>Adds what happened to the stream's time.</summary>
    /// <param name="note">The note.</param>
    public void Add(in ClockNote note) => _clock.Add(
        note.IsBorder ? "border" : "measurement",
        Cell.Whole(note.Measurement.FromReceived),
        Cell.Number(note.Measurement.TakenSeconds, 6),
        Cell.Number(note.Measurement.RemoteSeconds, 6),
        Cell.Number(note.Measurement.OffsetSeconds, 9),
        Cell.Number(note.Measurement.UncertaintySeconds, 9),
        note.IsBorder ? Cell.Whole(note.BlockRows) : "n/a");

    /// <summary>Hands everything to the operating system, and on to the medium if asked.</summary>
    /// <param name="toMedium">Survives a power cut.</param>
    public void Flush(bool toMedium)
    {
        foreach (var table in _all) table.Flush(toMedium);
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        foreach (var table in _all) table.Dispose();
    }
}
