using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Counts pulses, and says at the last instant whether one more may leave: lateness, age of its data, limits.</summary>
/// <remarks>Senders share it under a short lock; the decision thread never takes it. A pulse is counted when it is let
/// through, before the output is asked: if the output then fails, the worst is assumed. Written so that NaN refuses.</remarks>
internal sealed class PulseTally
{
    private const double MinuteSeconds = 60;

    // Stamps are doubles: two that should lie exactly one interval apart differ from it by rounding.
    private const double RoundingSeconds = 1e-6;

    // Enough to know a decision again that goes to several outputs at one instant.
    private const int LeastKept = 64;

    private readonly GateLimits? _limits;
    private readonly double _allowedLatenessSeconds;
    private readonly double _startSeconds;
    private readonly Lock _counting = new();   // guards all below
    private readonly Leave[] _leaves;          // a ring of the last pulses let through
    private int _used;

    /// <summary>Begins to count.</summary>
    /// <param name="limits">What is allowed; null: no limits were given.</param>
    /// <param name="allowedLatenessSeconds">How long after its due instant a pulse may still be sent.</param>
    /// <param name="startSeconds">When the run began, the run's clock.</param>
    internal PulseTally(GateLimits? limits, double allowedLatenessSeconds, double startSeconds)
    {
        _limits = limits;
        _allowedLatenessSeconds = allowedLatenessSeconds;
        _startSeconds = startSeconds;
        _leaves = new Leave[Math.Max(LeastKept, limits?.PulsesPerMinute ?? 0)];
    }

    /// <summary>Pulses let through; any thread.</summary>
    internal int Used => Volatile.Read(ref _used);

    /// <summary>The last question.</summary>
    /// <param name="decision">Pulse or sham; a sham is asked for in the same way and not counted.</param>
    /// <param name="acquiredSeconds">Stamp of its deciding row.</param>
    /// <param name="clock">The run's clock; read once the lock is held, so that waiting for it counts as lateness.</param>
    /// <param name="isUsedUp">A limit stands against it that won't be lifted in this run.</param>
    /// <returns><see cref="OutcomeKind.Sent"/> if it may leave, else late or over a limit.</returns>
    internal OutcomeKind Ask(in Decision decision, double acquiredSeconds, IClock clock, out bool isUsedUp)
    {
        isUsedUp = false;
        lock (_counting)
        {
            var now = clock.NowSeconds;
            var due = decision.DueSeconds;
            if (!(now - due <= _allowedLatenessSeconds)) return OutcomeKind.Late;
            if (_limits?.OldestDataMs is { } oldestMs && !(now - acquiredSeconds <= oldestMs / 1000)) return OutcomeKind.OverLimit;
            if (IsLetThrough(decision.Number)) return OutcomeKind.Sent;   // already, at another output: one pulse
            isUsedUp = IsUsedUp(Math.Max(now, due));
            if (isUsedUp || IsTooSoon(now, due)) return OutcomeKind.OverLimit;
            if (decision.Kind == DecisionKind.Pulse) Count(new Leave(decision.Number, due, now));
            return OutcomeKind.Sent;
        }
    }

    private bool IsLetThrough(long decision)
    {
        for (var back = 1; back <= Math.Min(_used, LeastKept); back++)
        {
            if (Back(back).Decision == decision) return true;
        }

        return false;
    }

    private bool IsUsedUp(double latestSeconds) =>
        (_limits?.PulsesPerSession is { } most && _used >= most)
        || (_limits?.LongestRunMinutes is { } minutes && !(latestSeconds - _startSeconds <= minutes * MinuteSeconds));

    private bool IsTooSoon(double now, double due)
    {
        if (_limits?.PulsesPerMinute is { } most)
        {
            if (most == 0) return true;
            if (_used >= most && IsWithin(MinuteSeconds, Back(most), now, due)) return true;
        }

        return _limits?.ShortestIntervalMs is { } shortestMs && _used > 0 && IsWithin(shortestMs / 1000, Back(1), now, due);
    }

    private static bool IsWithin(double seconds, in Leave earlier, double now, double due) =>
        !(due - earlier.DueSeconds >= seconds - RoundingSeconds && now - earlier.AtSeconds >= seconds - RoundingSeconds);

    private ref readonly Leave Back(int back) => ref _leaves[(_used - back) % _leaves.Length];

    private void Count(in Leave leave)
    {
        _leaves[_used % _leaves.Length] = leave;
        Volatile.Write(ref _used, _used + 1);
    }

    private readonly record struct Leave(long Decision, double DueSeconds, double AtSeconds);
}
