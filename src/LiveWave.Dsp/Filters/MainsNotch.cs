using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>
/// Removes mains hum: a notch at the mains frequency and at those of its second and third harmonics that lie below 0.4 of the
/// rate. Causal, same rate and channels.
/// </summary>
/// <remarks>
/// A missing value (NaN or an infinity) is held for the filter and comes out as NaN, in its row and channel alone. Each channel
/// settles on its first good value, so an electrode's offset makes no step. Hum that starts or changes rings for about
/// quality / (π·mains) seconds. Does not allocate after <see cref="Prepare"/>.
/// </remarks>
public sealed class MainsNotch : IConditioner
{
    private const int HighestHarmonic = 3;
    private const double HighestShareOfRate = 0.4;

    private readonly double _mainsHz;
    private readonly double _quality;
    private SecondOrderSections? _design;
    private SectionFilter _filter = null!;       // made by Prepare, as is the next
    private HeldRow _held = null!;

    /// <summary>Describes the notch; <see cref="Prepare"/> makes it.</summary>
    /// <param name="mainsHz">Mains frequency, 50 or 60 in most places; above 0, below half the rate.</param>
    /// <param name="quality">Mains over the notch's width at −3 dB, the same for harmonics; above 0.</param>
    /// <exception cref="RefusedException">A value is not a finite number above 0.</exception>
    public MainsNotch(double mainsHz, double quality = 30)
    {
        if (!double.IsFinite(mainsHz) || mainsHz <= 0)
        {
            throw new RefusedException(
                DesignLimits.Text($"mainsHz {mainsHz} is not a finite number above 0 Hz"), "", "50 or 60 in most places");
        }

        DesignLimits.Quality(quality);
        _mainsHz = mainsHz;
        _quality = quality;
    }

    /// <inheritdoc/>
    /// <exception cref="RefusedException">The mains frequency is not below half the rate.</exception>
    public StreamFormat Prepare(StreamFormat input)
    {
        ArgumentNullException.ThrowIfNull(input);
        var rateHz = input.NominalRateHz;
        DesignLimits.Frequency("mainsHz", _mainsHz, rateHz);
        var design = NotchDesign.Notch(_mainsHz, _quality, rateHz);
        for (var harmonic = 2; harmonic <= HighestHarmonic && harmonic * _mainsHz < HighestShareOfRate * rateHz; harmonic++)
        {
            design = design.Then(NotchDesign.Notch(harmonic * _mainsHz, _quality, rateHz));
        }

        _design = design;
        _filter = new SectionFilter(design, input.ChannelCount);
        _held = new HeldRow(input.ChannelCount);
        return input;
    }

    /// <inheritdoc/>
    /// <remarks>Every row comes out. <paramref name="conditioned"/> must not be <paramref name="row"/> itself.</remarks>
    public bool Step(ReadOnlySpan<double> row, Span<double> conditioned)
    {
        _held.Take(row, _filter);
        _filter.Step(_held.Values, conditioned);
        _held.Mask(row, conditioned);
        return true;
    }

    /// <inheritdoc/>
    public void Reset()
    {
        _filter?.Reset();
        _held?.Reset();
    }

    /// <inheritdoc/>
    /// <exception cref="InvalidOperationException">Not prepared yet: the delay depends on the rate.</exception>
    public double DelaySeconds(double frequencyHz) =>
        _design?.GroupDelaySeconds(frequencyHz) ?? throw new InvalidOperationException("the delay is known once the notch is prepared for a rate");
}
