namespace LiveWave.Abstractions;

/// <summary>Reads waves from the phasors of one frame. No allocation after <see cref="Prepare"/>; on the way to a decision.</summary>
public interface IWaveEstimator
{
    /// <summary>Makes ready for a patch.</summary>
    /// <param name="format">The patch's channels at the analysis rate.</param>
    /// <param name="band">The band.</param>
    /// <param name="layout">Where they lie, which are good.</param>
    /// <param name="calibration">What was learnt for it.</param>
    /// <returns>Samples between frames, at least 1.</returns>
    /// <exception cref="RefusedException">It can't run with this layout or calibration.</exception>
    int Prepare(StreamFormat format, Band band, Layout layout, Calibration calibration);

    /// <summary>Reads one frame. Lets exceptions out: the host contains them.</summary>
    /// <param name="now">The frame.</param>
    /// <param name="reading">Replaced; the host fills in patch, band and estimator.</param>
    void Read(Phasors now, ref Reading reading);

    /// <summary>Forgets earlier frames: as new.</summary>
    void Reset();
}
