using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>Numbers and reasons as the panels write them.</summary>
internal static class Words
{
    private const string Arrows = "→↗↑↖←↙↓↘";

    /// <summary>The arrow next to a direction; a dot where there is none.</summary>
    public static char Arrow(double degrees) =>
        double.IsNaN(degrees) ? '·' : Arrows[((int)Math.Round(degrees / 45) & 7)];

    /// <summary>Whole degrees, [0, 360).</summary>
    public static string Degrees(double degrees) =>
        double.IsNaN(degrees) ? "n/a" : $"{Math.Round(((degrees % 360) + 360) % 360) % 360:0}°";

    /// <summary>A count with its word, in the plural where it is one.</summary>
    public static string Count(long count, string word) => count == 1 ? $"1 {word}" : $"{count} {word}s";

    public static string Milliseconds(double ms) => double.IsNaN(ms) ? "n/a" : ms < 100 ? $"{ms:0.000}" : $"{ms:0.0}";

    /// <summary>A decision and what became of it, or why there was none.</summary>
    public static string Of(in Verdict verdict, IReadOnlyList<RuleSetup> rules)
    {
        var decision = verdict.Decision;
        if (decision.Kind == DecisionKind.Hold) return $"hold: {Reason(decision, rules)}";
        var late = (verdict.Outcome.Stages.SentSeconds - decision.DueSeconds) * 1000;
        var when = double.IsNaN(late) ? "" : $" {late:+0.00;−0.00;+0.00} ms";
        return $"{DecisionWords.What(decision.Kind)} {DecisionWords.Outcome(verdict.Outcome.Kind)}{when}";
    }

    /// <summary>It went the way that was planned, so far as this rig can know.</summary>
    public static bool IsAsPlanned(OutcomeKind kind) => kind <= OutcomeKind.Confirmed;

    private static string Reason(in Decision decision, IReadOnlyList<RuleSetup> rules)
    {
        if (decision.Failed == Condition.Direction && RuleOf(decision, rules) is { } rule)
        {
            return $"outside {Degrees(rule.DirectionDegrees)} ± {rule.ToleranceDegrees:0}°";
        }

        return decision.Failed switch
        {
            Condition.Kind => WaveKinds.Word(decision.Wave),
            Condition.StandardError => "direction not sure enough",
            Condition.Evidence => "too little evidence",
            Condition.Rest => "at rest after the last",
            var other => DecisionWords.Failed(other),
        };
    }

    private static RuleSetup? RuleOf(in Decision decision, IReadOnlyList<RuleSetup> rules)
    {
        foreach (var rule in rules)
        {
            if (rule.Name == decision.Rule) return rule;
        }

        return null;
    }
}
