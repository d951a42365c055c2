namespace LiveWave.Abstractions;

/// <summary>What stands between a row and the one before it.</summary>
[Flags]
public enum RowBreaks
{
    /// <summary>Nothing: the row follows the one before.</summary>
    None = 0,

    /// <summary>Rows were lost just before this one; <see cref="RowInstant.Index"/> jumps by their number.</summary>
    Gap = 1,

    /// <summary>The stream began anew here: every stage starts from rest.</summary>
    Restart = 2,
}
