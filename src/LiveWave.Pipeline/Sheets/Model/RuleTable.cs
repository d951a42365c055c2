using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A <c>[[rule]]</c> table: a condition under which the rig acts.</summary>
public sealed record RuleTable
{
    /// <summary>How the rule is called.</summary>
    public required string Name { get; init; }

    /// <summary>Name of the patch that it watches.</summary>
    public required string Patch { get; init; }

    /// <summary>Name of the band that it watches.</summary>
    public required string Band { get; init; }

    /// <summary>Name of the band's wave estimator whose events count; where the sheet does not say, the band's first.</summary>
    public required string Wave { get; init; }

    /// <summary>The kind of wave.</summary>
    public required WaveKind Kind { get; init; }

    /// <summary>Middle of the wanted sector, degrees counter-clockwise from +x, the way the wave travels; NaN: any direction.</summary>
    public required double DirectionDegrees { get; init; }

    /// <summary>Half the sector's width, degrees, above 0, at most 180; NaN: any direction.</summary>
    public required double ToleranceDegrees { get; init; }

    /// <summary>Largest standard error of the direction, degrees, above 0, at most 180.</summary>
    public required double StandardErrorDegrees { get; init; }

    /// <summary>Smallest evidence; NaN: that of the event is enough.</summary>
    public required double Evidence { get; init; }

    /// <summary>From the deciding row's stamp to the pulse, ms, at least 0.</summary>
    public required double LeadMs { get; init; }

    /// <summary>After a pulse or sham of this rule, how long it holds, ms, at least 0.</summary>
    public required double RestMs { get; init; }

    /// <summary>Share of matches, 0 to 1, for which by seeded lot no pulse is sent.</summary>
    public required double ShamFraction { get; init; }

    /// <summary>The pulse's code, 1 to 65535.</summary>
    public required int Code { get; init; }

    /// <summary>Names of the outputs that its pulses go to; empty: it only decides.</summary>
    public required IReadOnlyList<string> Outputs { get; init; }

    /// <summary>Whether the rule asks for a direction.</summary>
    public bool HasDirection => !double.IsNaN(DirectionDegrees);
}
