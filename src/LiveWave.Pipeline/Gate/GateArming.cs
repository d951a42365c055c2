namespace LiveWave.Pipeline;

/// <summary>Holds the gate's standing. Any thread; no locks.</summary>
internal sealed class GateArming(PulseTally tally)
{
    private volatile GateStanding _current = new(GateState.Disarmed, "", tally);

    /// <summary>The standing, now.</summary>
    internal GateStanding Current => _current;

    /// <summary>Changes the standing if nobody else did since it was looked at; so a disarming is never overtaken by an
    /// arming that was examined before it.</summary>
    internal bool TryChange(GateStanding examined, GateStanding next) =>
        Interlocked.CompareExchange(ref _current, next, examined) == examined;

    /// <summary>Disarms, whatever the standing is. The first reason since it last stood otherwise is kept.</summary>
    /// <returns>The standing before.</returns>
    internal GateStanding Disarm(string reason)
    {
        while (true)
        {
            var before = _current;
            var kept = before.State == GateState.Disarmed && before.Reason.Length > 0 ? before.Reason : reason;
            if (TryChange(before, new GateStanding(GateState.Disarmed, kept, before.Tally))) return before;
        }
    }
}
