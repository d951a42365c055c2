using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>A rule, ready to be judged.</summary>
public sealed record RuleSetup
{
    /// <summary>Its name in the sheet.</summary>
    public required string Name { get; init; }

    /// <summary>Which wave track it watches, by number.</summary>
    public required int Track { get; init; }

    /// <summary>The kind of wave wanted.</summary>
    public required WaveKind Kind { get; init; }

    /// <summary>Middle of the wanted sector, degrees; NaN: any direction.</summary>
    public double DirectionDegrees { get; init; } = double.NaN;

    /// <summary>Half width of the wanted sector, degrees.</summary>
    public double ToleranceDegrees { get; init; } = 180;

    /// <summary>Largest standard error of the direction, degrees; infinite: any, known or not.</summary>
    public double StandardErrorDegrees { get; init; } = double.PositiveInfinity;

    /// <summary>Smallest evidence; −infinite: whatever holds the event.</summary>
    public double Evidence { get; init; } = double.NegativeInfinity;

    /// <summary>From the deciding row's stamp to the pulse, ms.</summary>
    public required double LeadMs { get; init; }

    /// <summary>Rest after a pulse or sham of this rule, ms.</summary>
    public required double RestMs { get; init; }

    /// <summary>Share of matches that are shams, 0 to 1.</summary>
    public double ShamFraction { get; init; }

    /// <summary>The code its pulses carry.</summary>
    public int Code { get; init; } = 1;

    /// <summary>The outputs its pulses go to, by number in the gate.</summary>
    public required IReadOnlyList<int> Outputs { get; init; }
}
