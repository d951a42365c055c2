using System.Numerics;

namespace LiveWave.Dsp;

/// <summary>
/// The last good value of each channel: what a recursive filter is fed with in place of a missing one (NaN or an infinity), and
/// the mask that makes the same channels missing in what comes out.
/// </summary>
/// <remarks>Allocates when made, never after. One thread at a time.</remarks>
internal sealed class HeldRow
{
    private static readonly Vector<double> Missing = new(double.NaN);

    private readonly double[] _values;
    private readonly bool[] _known;
    private int _unknown;

    /// <summary>Nothing known yet: every channel holds 0.</summary>
    /// <param name="channelCount">At least 1.</param>
    public HeldRow(int channelCount)
    {
        _values = new double[channelCount];
        _known = new bool[channelCount];
        _unknown = channelCount;
    }

    /// <summary>The last good value of each channel; 0 before the first.</summary>
    public ReadOnlySpan<double> Values => _values;

    /// <summary>Takes one row and settles a filter for those channels that had no good value before.</summary>
    /// <param name="row">One value a channel; NaN or infinite = missing.</param>
    /// <param name="filter">What is fed with <see cref="Values"/>.</param>
    public void Take(ReadOnlySpan<double> row, SectionFilter filter)
    {
        row = row[.._values.Length];
        if (_unknown > 0) SettleNew(row, filter);

        var values = _values.AsSpan();
        var channel = 0;
        for (; channel <= row.Length - Vector<double>.Count; channel += Vector<double>.Count)
        {
            var x = new Vector<double>(row[channel..]);
            Vector.ConditionalSelect(Vector.IsFinite(x), x, new Vector<double>(values[channel..])).CopyTo(values[channel..]);
        }

        for (; channel < row.Length; channel++)
        {
            if (double.IsFinite(row[channel])) values[channel] = row[channel];
        }
    }

    /// <summary>Makes missing in a row of output what is missing in a row of input.</summary>
    /// <param name="row">The row last taken.</param>
    /// <param name="output">Overwritten with NaN where <paramref name="row"/> has no finite value.</param>
    public void Mask(ReadOnlySpan<double> row, Span<double> output)
    {
        row = row[.._values.Length];
        output = output[.._values.Length];
        var channel = 0;
        for (; channel <= row.Length - Vector<double>.Count; channel += Vector<double>.Count)
        {
            var isFinite = Vector.IsFinite(new Vector<double>(row[channel..]));
            Vector.ConditionalSelect(isFinite, new Vector<double>(output[channel..]), Missing).CopyTo(output[channel..]);
        }

        for (; channel < row.Length; channel++)
        {
            if (!double.IsFinite(row[channel])) output[channel] = double.NaN;
        }
    }

    /// <summary>Forgets everything: as new.</summary>
    public void Reset()
    {
        _values.AsSpan().Clear();
        _known.AsSpan().Clear();
        _unknown = _known.Length;
    }

    private void SettleNew(ReadOnlySpan<double> row, SectionFilter filter)
    {
        for (var channel = 0; channel < row.Length; channel++)
        {
            if (_known[channel] || !double.IsFinite(row[channel])) continue;

            filter.Settle(channel, row[channel]);
            _known[channel] = true;
            _unknown--;
        }
    }
}
