using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The words for decisions, conditions and outcomes in tables and on screens.</summary>
public static class DecisionWords
{
    private static readonly string[] Kinds = ["hold", "pulse", "sham"];

    private static readonly string[] Conditions =
    [
        "n/a", "kind", "direction", "standard error", "evidence", "speed", "phase", "permit", "rest", "calibration",
    ];

    private static readonly string[] Outcomes =
    [
        "nothing due", "withheld", "rehearsed", "sent", "confirmed", "not confirmed", "not armed", "late", "over a limit",
        "output busy", "cancelled", "refused by the output",
    ];

    /// <summary>The word for a kind of decision.</summary>
    /// <param name="kind">The kind.</param>
    public static string What(DecisionKind kind) => Kinds[(int)kind];

    /// <summary>The word for a condition; <c>n/a</c> where none failed.</summary>
    /// <param name="condition">The condition.</param>
    public static string Failed(Condition condition) => Conditions[(int)condition];

    /// <summary>The word for an outcome.</summary>
    /// <param name="kind">The outcome.</param>
    public static string Outcome(OutcomeKind kind) => Outcomes[(int)kind];
}
