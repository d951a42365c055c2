namespace LiveWave.Abstractions;

/// <summary>Estimates the phasors of all channels of a patch in one band. Causal; no allocation after <see cref="Prepare"/>; on
/// the way to a decision.</summary>
public interface IPhaseEstimator
{
    /// <summary>Makes ready for a patch.</summary>
    /// <param name="format">The patch's channels at the analysis rate.</param>
    /// <param name="band">The band, with every horizon that will be asked for.</param>
    /// <param name="calibration">What was learnt for it.</param>
    /// <exception cref="RefusedException">It can't run with this rate, band or calibration.</exception>
    void Prepare(StreamFormat format, Band band, Calibration calibration);

    /// <summary>Takes one row; the host has set <see cref="Phasors.At"/>. Rows that were lost are handed in as missing.</summary>
    /// <param name="row">Physical units, NaN = missing; a NaN stays in its channel and never leaves.</param>
    /// <param name="now">Filled: phasors, spread and validity at this row.</param>
    void Step(ReadOnlySpan<double> row, Phasors now);

    /// <summary>Predicts from the last row.</summary>
    /// <param name="horizonSamples">One of <see cref="Band.HorizonSamples"/>.</param>
    /// <param name="then">Filled, the spread grown accordingly.</param>
    void Predict(int horizonSamples, Phasors then);

    /// <summary>Back to rest: as new.</summary>
    void Reset();
}
