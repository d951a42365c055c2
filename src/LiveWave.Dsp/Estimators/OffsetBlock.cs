using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Takes away each channel's slow offset before the phase: a Butterworth high-pass of order 2 at 1/16 of the band's
/// lower edge (phase study, section 3).</summary>
internal sealed class OffsetBlock
{
    private const int Order = 2;
    private const double EdgeOverCutoff = 16;

    private readonly SectionFilter _filter;

    /// <summary>Designs the high-pass; at rest.</summary>
    /// <param name="band">The band whose phase is read.</param>
    /// <param name="rateHz">Rows per second.</param>
    /// <param name="channelCount">At least 1.</param>
    /// <exception cref="RefusedException">The rate is too low for the band.</exception>
    internal OffsetBlock(Band band, double rateHz, int channelCount)
    {
        var design = ButterworthDesign.HighPass(Order, band.LowHz / EdgeOverCutoff, rateHz);
        _filter = new SectionFilter(design, channelCount);
        var (re, im) = design.ResponseAt(band.CentreHz, rateHz);
        var modulus = Math.Sqrt((re * re) + (im * im));
        Back = new Turn(re / modulus, -im / modulus);
    }

    /// <summary>exp(−i·lead): turns a phasor at the band's centre back to where it was before the high-pass.</summary>
    internal Turn Back { get; }

    /// <summary>Takes one row.</summary>
    /// <param name="row">Finite.</param>
    /// <param name="blocked">Filled.</param>
    internal void Step(ReadOnlySpan<double> row, Span<double> blocked) => _filter.Step(row, blocked);

    /// <summary>Settles one channel as if its value had always been this.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="value">The constant, finite.</param>
    internal void Settle(int channel, double value) => _filter.Settle(channel, value);

    /// <summary>Back to rest: all channels settled on zero.</summary>
    internal void Reset() => _filter.Reset();
}
