namespace LiveWave.Abstractions;

/// <summary>The request or its input was wrong: what, where, and what to do. Shown as one line, exit code 2.</summary>
public sealed class RefusedException : Exception
{
    /// <summary>Refuses something.</summary>
    /// <param name="what">What is wrong.</param>
    /// <param name="where">File, line, key, channel; empty where there is no place.</param>
    /// <param name="advice">What to do, or what is allowed.</param>
    /// <param name="inner">The error behind it.</param>
    public RefusedException(string what, string where, string advice, Exception? inner = null)
        : base(Line(what, where, advice), inner)
    {
        What = what;
        Where = where;
        Advice = advice;
    }

    /// <summary>What is wrong.</summary>
    public string What { get; }

    /// <summary>File, line, key, channel; empty where there is no place.</summary>
    public string Where { get; }

    /// <summary>What to do, or what is allowed.</summary>
    public string Advice { get; }

    private static string Line(string what, string where, string advice) =>
        (where.Length == 0 ? "" : where + ": ") + what + (advice.Length == 0 ? "" : "; " + advice);
}
