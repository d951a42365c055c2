using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>A filter as a cascade of second-order sections. Immutable; the filter that runs it is <see cref="SectionFilter"/>.</summary>
public sealed class SecondOrderSections
{
    private readonly SecondOrderSection[] _sections;

    /// <summary>Makes a cascade.</summary>
    /// <param name="rateHz">Sampling rate for which it was designed, above 0.</param>
    /// <param name="sections">At least one, in the order in which they run; each stable.</param>
    /// <exception cref="RefusedException">The rate is not a finite number above 0 Hz, or a section's coefficients are not finite or not stable.</exception>
    public SecondOrderSections(double rateHz, params IReadOnlyList<SecondOrderSection> sections)
    {
        ArgumentNullException.ThrowIfNull(sections);
        ArgumentOutOfRangeException.ThrowIfZero(sections.Count, nameof(sections));
        DesignLimits.Rate(rateHz);
        RateHz = rateHz;
        _sections = [.. sections];
        for (var i = 0; i < _sections.Length; i++) RefuseUnstable(i);
    }

    /// <summary>Sampling rate for which the cascade was designed.</summary>
    public double RateHz { get; }

    /// <summary>Number of sections, at least 1.</summary>
    public int Count => _sections.Length;

    /// <summary>One section, in running order.</summary>
    /// <param name="index">0 up to <see cref="Count"/> − 1.</param>
    public SecondOrderSection this[int index] => _sections[index];

    /// <summary>Gain for a constant input (0 Hz).</summary>
    public double GainForConstant
    {
        get
        {
            var gain = 1.0;
            foreach (var section in _sections) gain *= section.GainForConstant;
            return gain;
        }
    }

    /// <summary>Complex gain at a frequency, at the design's rate.</summary>
    /// <param name="frequencyHz">0 up to half the rate.</param>
    /// <returns>Real and imaginary part; the phase lead is their angle.</returns>
    public (double Re, double Im) ResponseAt(double frequencyHz) => ResponseAt(frequencyHz, RateHz);

    /// <summary>Complex gain at a frequency if the rows come at a given rate.</summary>
    /// <param name="frequencyHz">0 up to half the rate.</param>
    /// <param name="rateHz">Rows per second.</param>
    /// <returns>Real and imaginary part; the phase lead is their angle.</returns>
    public (double Re, double Im) ResponseAt(double frequencyHz, double rateHz)
    {
        var at = new UnitCirclePoint(2 * Math.PI * frequencyHz / rateHz);
        var (re, im) = (1.0, 0.0);
        foreach (var section in _sections)
        {
            var (sectionRe, sectionIm) = section.ResponseAt(at);
            (re, im) = ((re * sectionRe) - (im * sectionIm), (re * sectionIm) + (im * sectionRe));
        }

        return (re, im);
    }

    /// <summary>Delay of a slow change in the envelope at a frequency: −d phase / dω, in closed form for each section.</summary>
    /// <param name="frequencyHz">Above 0, below half the rate. Where the filter lets nothing through, what holds beside it.</param>
    /// <returns>Seconds at the design's rate; below 0 where the filter leads.</returns>
    public double GroupDelaySeconds(double frequencyHz)
    {
        var at = new UnitCirclePoint(2 * Math.PI * frequencyHz / RateHz);
        var samples = 0.0;
        foreach (var section in _sections) samples += section.GroupDelaySamples(at);
        return samples / RateHz;
    }

    /// <summary>This cascade followed by others of the same rate.</summary>
    /// <param name="others">Cascades that run after this one, in order.</param>
    /// <exception cref="RefusedException">A rate differs.</exception>
    public SecondOrderSections Then(params IReadOnlyList<SecondOrderSections> others)
    {
        ArgumentNullException.ThrowIfNull(others);
        var sections = new List<SecondOrderSection>(_sections);
        foreach (var other in others)
        {
            if (other.RateHz != RateHz)
            {
                throw new RefusedException(
                    DesignLimits.Text($"a cascade for {other.RateHz} Hz can't follow one for {RateHz} Hz"), "", "design both for one rate");
            }

            sections.AddRange(other._sections);
        }

        return new SecondOrderSections(RateHz, sections);
    }

    private void RefuseUnstable(int index)
    {
        var section = _sections[index];
        var isFinite = double.IsFinite(section.B0) && double.IsFinite(section.B1) && double.IsFinite(section.B2);
        if (isFinite && section.IsStable) return;

        throw new RefusedException(
            DesignLimits.Text($"section {index + 1} of {_sections.Length} has {(isFinite ? "a pole outside the unit circle" : "a coefficient that is not finite")}"),
            "",
            "the edges lie too close together or too near to 0 Hz for the rate; widen the band or lower the rate first");
    }
}
