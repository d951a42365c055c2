namespace LiveWave.Display;

/// <summary>How a run stands after a block, taken on the decision thread.</summary>
/// <param name="StampSeconds">Stamp of the newest row judged.</param>
/// <param name="ComputingSeconds">How long the block took to be judged.</param>
/// <param name="Rows">Rows judged.</param>
/// <param name="LostRows">Rows lost on the way in.</param>
/// <param name="Gaps">In how many gaps.</param>
/// <param name="BlankedRows">Rows marked as missing because of own pulses.</param>
internal readonly record struct RunGlance(
    double StampSeconds, double ComputingSeconds, long Rows, long LostRows, long Gaps, long BlankedRows);
