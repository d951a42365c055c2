namespace LiveWave.Display;

/// <summary>The evidence of one frame.</summary>
/// <param name="StampSeconds">When.</param>
/// <param name="Excess">Evidence above the threshold that holds for its direction; −∞ where a gate held it back.</param>
internal readonly record struct EvidencePoint(double StampSeconds, double Excess);
