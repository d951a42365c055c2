using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>An output as the gate drives it. The gate owns it from then on: opens, quiets and disposes it.</summary>
public sealed record GateOutput
{
    /// <summary>Names an output.</summary>
    /// <param name="name">Its name in the sheet.</param>
    /// <param name="output">The output, not opened.</param>
    public GateOutput(string name, IOutput output)
    {
        ArgumentException.ThrowIfNullOrEmpty(name);
        ArgumentNullException.ThrowIfNull(output);
        Name = name;
        Output = output;
    }

    /// <summary>Its name in the sheet.</summary>
    public string Name { get; }

    /// <summary>The output.</summary>
    public IOutput Output { get; }

    /// <summary>How long one call may take before the output is declared faulty, ms, above 0 to 60 000.</summary>
    /// <remarks>Defaults to 100: a serial or network write that takes longer is stuck, and disarming may have to wait this long.</remarks>
    public double PatienceMs { get; init; } = 100;

    /// <summary>The sheet marks it as a dummy (stimulator off or on a load): a rehearsal drives it.</summary>
    public bool IsDummy { get; init; }
}
