namespace LiveWave.Pipeline;

/// <summary>One thing that is wrong in a sheet.</summary>
/// <param name="Line">Line of the key, or of its table where the key is missing; from 1.</param>
/// <param name="Key">Tables and key, with dots.</param>
/// <param name="What">What is wrong with it.</param>
/// <param name="Advice">What is allowed, or what to do.</param>
public sealed record SheetFault(int Line, string Key, string What, string Advice);
