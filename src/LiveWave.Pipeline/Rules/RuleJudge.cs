using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Pipeline;

/// <summary>Judges one rule, row by row: one decision per wave event.</summary>
/// <remarks>A state machine on the sample index. Pulse or sham at the first row where all conditions hold; else one hold at the
/// event's end, which names the first failing condition at the event's best row: the row at which most conditions held in
/// order, then the largest evidence, then the earliest. What happens to a pulse never comes back here. Allocates nothing.</remarks>
public sealed class RuleJudge
{
    private const double Slack = 1e-9;   // of a row: spans that are whole rows stay so
    private readonly RuleSetup _rule;
    private readonly ulong _seed;
    private readonly string _sessionId;
    private readonly long _restRows;
    private long _decidedEvent;
    private long _lastActed = long.MinValue;
    private long _bestEvent;
    private Condition _bestFailed;
    private Decision _best;

    /// <summary>Makes ready.</summary>
    /// <param name="rule">The rule.</param>
    /// <param name="rateHz">Rate of the rows as received, which <c>index</c> counts.</param>
    /// <param name="seed">The session's seed: lots are keyed by it.</param>
    /// <param name="sessionId">The session's name of its own: two sessions from one sheet don't repeat each other's lots.</param>
    public RuleJudge(RuleSetup rule, double rateHz, ulong seed, string sessionId)
    {
        ArgumentNullException.ThrowIfNull(rule);
        _rule = rule;
        _seed = seed;
        _sessionId = sessionId;
        _restRows = (long)Math.Ceiling((rule.RestMs * rateHz / 1000) - Slack);
        LeadRows = (long)Math.Ceiling((rule.LeadMs * rateHz / 1000) - Slack);
    }

    /// <summary>The rule.</summary>
    public RuleSetup Rule => _rule;

    /// <summary>From the deciding row to the first row at or after the due instant, rows.</summary>
    public long LeadRows { get; }

    /// <summary>Judges a row while an event passes.</summary>
    /// <param name="passing">The event as it stands now.</param>
    /// <param name="evidence">Evidence of its newest frame.</param>
    /// <param name="now">The row.</param>
    /// <param name="decision">A pulse or sham.</param>
    /// <returns>True if it was decided at this row.</returns>
    public bool Judge(in WaveEvent passing, double evidence, in RowInstant now, out Decision decision)
    {
        decision = default;
        if (passing.Number == _decidedEvent) return false;
        var failed = FirstFailing(passing, evidence, now);
        if (failed != Condition.None)
        {
            Remember(passing, evidence, now, failed);
            return false;
        }

        var lot = KeyedLot.Draw(_seed, _sessionId, _rule.Name, passing.Onset.Received);
        decision = Describe(passing, evidence, now) with
        {
            Kind = lot < _rule.ShamFraction ? DecisionKind.Sham : DecisionKind.Pulse,
            DueSeconds = now.StampSeconds + (_rule.LeadMs / 1000),
            Lot = lot,
        };
        _decidedEvent = passing.Number;
        _lastActed = now.Index;
        return true;
    }

    /// <summary>The event is over: a hold, unless it was decided.</summary>
    /// <param name="ended">The event.</param>
    /// <param name="decision">The hold.</param>
    /// <returns>True if there is one.</returns>
    public bool Close(in WaveEvent ended, out Decision decision)
    {
        decision = _best with { Kind = DecisionKind.Hold, Failed = _bestFailed };
        return ended.Number != _decidedEvent && ended.Number == _bestEvent;
    }

    private Condition FirstFailing(in WaveEvent passing, double evidence, in RowInstant now)
    {
        if (passing.Kind != _rule.Kind) return Condition.Kind;
        if (!double.IsNaN(_rule.DirectionDegrees) && !InSector(passing.DirectionDegrees)) return Condition.Direction;
        if (!double.IsPositiveInfinity(_rule.StandardErrorDegrees)
            && !(passing.DirectionStandardErrorDegrees <= _rule.StandardErrorDegrees))
        {
            return Condition.StandardError;
        }

        if (!(evidence >= _rule.Evidence)) return Condition.Evidence;
        return _lastActed != long.MinValue && now.Index - _lastActed < _restRows ? Condition.Rest : Condition.None;
    }

    private bool InSector(double directionDegrees)
    {
        var off = directionDegrees - _rule.DirectionDegrees;
        off -= 360 * Math.Floor((off + 180) / 360);
        return Math.Abs(off) <= _rule.ToleranceDegrees;
    }

    private void Remember(in WaveEvent passing, double evidence, in RowInstant now, Condition failed)
    {
        var isBetter = passing.Number != _bestEvent
            || failed > _bestFailed
            || (failed == _bestFailed && evidence > _best.Evidence);
        if (!isBetter) return;
        _bestEvent = passing.Number;
        _bestFailed = failed;
        _best = Describe(passing, evidence, now);
    }

    private Decision Describe(in WaveEvent passing, double evidence, in RowInstant now) => new()
    {
        Rule = _rule.Name,
        EventNumber = passing.Number,
        Patch = passing.Patch,
        Band = passing.Band,
        At = now,
        Onset = passing.Onset,
        Wave = passing.Kind,
        DirectionDegrees = passing.DirectionDegrees,
        DirectionStandardErrorDegrees = passing.DirectionStandardErrorDegrees,
        Evidence = evidence,
        DueSeconds = double.NaN,
        Code = _rule.Code,
        Lot = double.NaN,
        PredictedPhaseDegrees = double.NaN,
    };
}
