namespace LiveWave.Pipeline;

/// <summary>A value of a sheet as it was written.</summary>
/// <param name="Line">Line of its key (in a list: its own), from 1.</param>
/// <param name="Content">A <see cref="string"/>, <see cref="long"/>, <see cref="double"/> or <see cref="bool"/>, a
/// <see cref="ParsedTable"/>, a list of <see cref="ParsedValue"/>; null for a date or time, which no key takes.</param>
public sealed record ParsedValue(int Line, object? Content)
{
    /// <summary>What it is, in words, for messages.</summary>
    internal string Described => Content switch
    {
        string => "a text",
        long or double => "a number",
        bool => "true or false",
        ParsedTable => "a table",
        IReadOnlyList<ParsedValue> => "a list",
        _ => "a date or time",
    };
}
