namespace LiveWave.Pipeline;

/// <summary>An <c>[[output]]</c> table: where pulses go.</summary>
public sealed record OutputTable
{
    /// <summary>How the output is called.</summary>
    public required string Name { get; init; }

    /// <summary>The kind of output: <c>none</c> sends nothing, <c>memory</c> keeps pulses in memory.</summary>
    public required string Plugin { get; init; }

    /// <summary>The plug-in's own options: a <see cref="double"/>, <see cref="bool"/> or <see cref="string"/> each; may be empty.</summary>
    public required IReadOnlyDictionary<string, object> Options { get; init; }

    /// <summary>How long a send may take before the output counts as faulty, ms, above 0.</summary>
    public required double PatienceMs { get; init; }

    /// <summary>The stimulator is off or on a load, so that rehearsals may drive it.</summary>
    public required bool Dummy { get; init; }

    /// <summary>Where the options stand, for messages: file, line, table.</summary>
    public required string Where { get; init; }
}
