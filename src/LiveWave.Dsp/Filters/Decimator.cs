using System.Numerics;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>
/// Brings a stream down to an analysis rate, a whole number of times lower: an anti-alias low-pass on every row, of which every n-th
/// comes out. Causal, same channels.
/// </summary>
/// <remarks>
/// <para>
/// Chebyshev II, order 8, 60 dB from 0.6 of the analysis rate on: what folds to below 0.4 of it is at least 60 dB down. The gain is 1 within
/// 0.1 dB up to 0.33 of the analysis rate and −3 dB at 0.40. The delay is about 1.5 rows of the analysis rate (1.49 ms at 5 Hz, 1.53 ms at
/// 80 Hz, from 30 kHz to 1 kHz) and the same for all channels: phases come out that late, directions as they were.
/// </para>
/// <para>
/// A missing value (NaN or an infinity) is held for the filter; a channel comes out as NaN where more than half of the values since the last
/// row that came out were missing, so that neither a single lost sample blanks a row nor a blanked pulse leaves one standing. Each channel
/// settles on its first good value. Does not allocate after <see cref="Prepare"/>.
/// </para>
/// </remarks>
public sealed class Decimator : IConditioner
{
    /// <summary>Bands that end below this share of the analysis rate are left whole: −3 dB at their edge at the worst, nothing folded in.</summary>
    public const double HighestShareOfRate = 0.4;

    private const int Order = 8;
    private const double AttenuationDb = 60;
    private const double StopShareOfRate = 0.6;
    private const double RateTolerance = 1e-6;

    private readonly double _analysisRateHz;
    private SecondOrderSections? _design;
    private SectionFilter _filter = null!;       // made by Prepare, as are the next
    private HeldRow _held = null!;
    private double[] _filtered = null!;
    private double[] _missing = null!;           // values of each channel since the last row that came out
    private int _factor;
    private int _taken;

    /// <summary>Describes the decimator; <see cref="Prepare"/> makes it.</summary>
    /// <param name="analysisRateHz">Rows a second that come out, above 0; the stream's rate must be a whole number of times this, at least twice.</param>
    /// <exception cref="RefusedException">The rate is not a finite number above 0.</exception>
    public Decimator(double analysisRateHz)
    {
        if (!double.IsFinite(analysisRateHz) || analysisRateHz <= 0)
        {
            throw new RefusedException(
                DesignLimits.Text($"analysisRateHz {analysisRateHz} is not a finite number above 0 Hz"), "", "500 to 2000 do for most rhythms");
        }

        _analysisRateHz = analysisRateHz;
    }

    /// <summary>The whole number by which a rate must be divided to give another.</summary>
    /// <param name="rateHz">The stream's rate, Hz.</param>
    /// <param name="analysisRateHz">The rate wanted, Hz; right to a millionth.</param>
    /// <returns>At least 1; 0 where there is none.</returns>
    public static int Factor(double rateHz, double analysisRateHz)
    {
        var factor = Math.Round(rateHz / analysisRateHz);
        var isWhole = factor is >= 1 and <= int.MaxValue && Math.Abs((rateHz / (factor * analysisRateHz)) - 1) <= RateTolerance;
        return isWhole ? (int)factor : 0;
    }

    /// <summary>Why a stream can't be brought down to a rate.</summary>
    /// <param name="rateHz">The stream's rate, above 0 Hz.</param>
    /// <param name="analysisRateHz">The rate wanted, above 0 Hz.</param>
    /// <returns>What is wrong and what to do, for people; null where it can.</returns>
    public static (string What, string Advice)? Refusal(double rateHz, double analysisRateHz)
    {
        var factor = Factor(rateHz, analysisRateHz);
        if (factor >= 2) return null;
        if (factor == 1 || rateHz < analysisRateHz)
        {
            return (DesignLimits.Text($"it is not below the stream's rate ({rateHz} Hz)"), "leave it out, or lower it");
        }

        var next = Math.Ceiling(rateHz / analysisRateHz);
        return (
            DesignLimits.Text($"it does not divide the stream's rate ({rateHz} Hz)"),
            next > 2
                ? DesignLimits.Text($"give {rateHz / (next - 1)} or {rateHz / next}, or another that does")
                : DesignLimits.Text($"give {rateHz / next}, or a lower one that does"));
    }

    /// <inheritdoc/>
    /// <exception cref="RefusedException">The stream's rate is not a whole number of times, at least twice, the analysis rate.</exception>
    public StreamFormat Prepare(StreamFormat input)
    {
        ArgumentNullException.ThrowIfNull(input);
        var rateHz = input.NominalRateHz;
        DesignLimits.Rate(rateHz);
        if (Refusal(rateHz, _analysisRateHz) is var (what, advice))
        {
            throw new RefusedException(DesignLimits.Text($"analysisRateHz is {_analysisRateHz}: {what}"), "", advice);
        }

        _factor = Factor(rateHz, _analysisRateHz);
        var output = input.AtRate(rateHz / _factor);
        _design = ChebyshevTwoDesign.LowPass(Order, AttenuationDb, StopShareOfRate * output.NominalRateHz, rateHz);
        _filter = new SectionFilter(_design, input.ChannelCount);
        _held = new HeldRow(input.ChannelCount);
        _filtered = new double[input.ChannelCount];
        _missing = new double[input.ChannelCount];
        _taken = 0;
        return output;
    }

    /// <inheritdoc/>
    /// <remarks>The n-th, 2n-th, … row since the start or <see cref="Reset"/> gives a row, which stands at it.</remarks>
    public bool Step(ReadOnlySpan<double> row, Span<double> conditioned)
    {
        row = row[.._missing.Length];
        _held.Take(row, _filter);
        _filter.Step(_held.Values, _filtered);
        CountMissing(row);
        if (++_taken < _factor) return false;

        _taken = 0;
        Give(conditioned[.._missing.Length]);
        return true;
    }

    /// <inheritdoc/>
    public void Reset()
    {
        _filter?.Reset();
        _held?.Reset();
        _missing?.AsSpan().Clear();
        _taken = 0;
    }

    /// <inheritdoc/>
    /// <exception cref="InvalidOperationException">Not prepared yet: the delay depends on the rate.</exception>
    public double DelaySeconds(double frequencyHz) =>
        _design?.GroupDelaySeconds(frequencyHz) ?? throw new InvalidOperationException("the delay is known once the decimator is prepared for a rate");

    private void CountMissing(ReadOnlySpan<double> row)
    {
        var missing = _missing.AsSpan();
        var channel = 0;
        for (; channel <= row.Length - Vector<double>.Count; channel += Vector<double>.Count)
        {
            var isFinite = Vector.IsFinite(new Vector<double>(row[channel..]));
            var count = new Vector<double>(missing[channel..]);
            Vector.ConditionalSelect(isFinite, count, count + Vector<double>.One).CopyTo(missing[channel..]);
        }

        for (; channel < row.Length; channel++)
        {
            if (!double.IsFinite(row[channel])) missing[channel]++;
        }
    }

    private void Give(Span<double> conditioned)
    {
        for (var channel = 0; channel < conditioned.Length; channel++)
        {
            conditioned[channel] = 2 * _missing[channel] > _factor ? double.NaN : _filtered[channel];
            _missing[channel] = 0;
        }
    }
}
