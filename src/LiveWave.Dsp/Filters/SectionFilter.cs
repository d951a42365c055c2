using System.Numerics;

namespace LiveWave.Dsp;

/// <summary>
/// Runs a cascade of second-order sections over rows: the same filter on every channel, causal, row by row, at rest until the
/// first row or <see cref="Settle(ReadOnlySpan{double})"/>.
/// </summary>
/// <remarks>
/// <para>
/// Direct form II transposed, for each section y = b0·x + s1, s1 ← b1·x − a1·y + s2, s2 ← b2·x − a2·y. Vectorised along channels;
/// the same bits at every vector width. Allocates when made, never after. One thread at a time.
/// </para>
/// <para>Linear and nothing more: a NaN or an infinity stays in its channel's state for good. The caller holds values instead.</para>
/// <para>
/// After an input went silent the state dies away into numbers below 1e-308, with which processors reckon slower, some by far
/// (2.5 times where measured); every 1024th row what is below 1e-250 is set to zero.
/// </para>
/// </remarks>
public sealed class SectionFilter
{
    private const int SweepMask = 1024 - 1;
    private const double Negligible = 1e-250;

    private readonly SecondOrderSections _sections;
    private readonly int _channelCount;
    private readonly int _stride;
    private readonly double[] _state;        // [section · 2 + (0: s1, 1: s2)] rows of _stride
    private int _rows;

    /// <summary>Makes a filter at rest.</summary>
    /// <param name="sections">The cascade.</param>
    /// <param name="channelCount">Values a row, at least 1.</param>
    public SectionFilter(SecondOrderSections sections, int channelCount)
    {
        ArgumentNullException.ThrowIfNull(sections);
        _sections = sections;
        _channelCount = channelCount;
        _stride = Abstractions.RowLength.Padded(channelCount);
        _state = new double[2 * sections.Count * _stride];
    }

    /// <summary>Values a row.</summary>
    public int ChannelCount => _channelCount;

    /// <summary>Filters one row.</summary>
    /// <param name="row">One value a channel, finite.</param>
    /// <param name="output">As long; may be <paramref name="row"/> itself.</param>
    /// <exception cref="ArgumentOutOfRangeException">A span is shorter than a row.</exception>
    public void Step(ReadOnlySpan<double> row, Span<double> output)
    {
        row = row[.._channelCount];
        output = output[.._channelCount];
        for (var i = 0; i < _sections.Count; i++)
        {
            var s1 = _state.AsSpan(2 * i * _stride, _channelCount);
            var s2 = _state.AsSpan(((2 * i) + 1) * _stride, _channelCount);
            Step(_sections[i], row, output, s1, s2);
            row = output;
        }

        if ((++_rows & SweepMask) == 0) Sweep();
    }

    /// <summary>Puts every channel in the state it would have after an endless constant, so that no step is seen at the start.</summary>
    /// <param name="row">The constant of each channel, finite.</param>
    /// <exception cref="ArgumentOutOfRangeException">The span is shorter than a row.</exception>
    public void Settle(ReadOnlySpan<double> row)
    {
        row = row[.._channelCount];
        for (var channel = 0; channel < row.Length; channel++) Settle(channel, row[channel]);
    }

    /// <summary>Settles one channel alone.</summary>
    /// <param name="channel">0 up to <see cref="ChannelCount"/> − 1.</param>
    /// <param name="constant">Its constant, finite.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such channel.</exception>
    public void Settle(int channel, double constant)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual((uint)channel, (uint)_channelCount, nameof(channel));
        var input = constant;
        for (var i = 0; i < _sections.Count; i++)
        {
            var section = _sections[i];
            var settled = section.GainForConstant * input;
            var s2 = (section.B2 * input) - (section.A2 * settled);
            _state[((2 * i) + 1) * _stride + channel] = s2;
            _state[(2 * i * _stride) + channel] = ((section.B1 * input) - (section.A1 * settled)) + s2;
            input = settled;
        }
    }

    /// <summary>Back to rest: as new.</summary>
    public void Reset()
    {
        _state.AsSpan().Clear();
        _rows = 0;
    }

    private static void Step(
        in SecondOrderSection section, ReadOnlySpan<double> row, Span<double> output, Span<double> s1, Span<double> s2)
    {
        var (b0, b1, b2, a1, a2) = section;
        var channel = 0;
        if (row.Length >= Vector<double>.Count)
        {
            var (vb0, vb1, vb2) = (new Vector<double>(b0), new Vector<double>(b1), new Vector<double>(b2));
            var (va1, va2) = (new Vector<double>(a1), new Vector<double>(a2));
            for (; channel <= row.Length - Vector<double>.Count; channel += Vector<double>.Count)
            {
                var vx = new Vector<double>(row[channel..]);
                var vy = (vb0 * vx) + new Vector<double>(s1[channel..]);
                (((vb1 * vx) - (va1 * vy)) + new Vector<double>(s2[channel..])).CopyTo(s1[channel..]);
                ((vb2 * vx) - (va2 * vy)).CopyTo(s2[channel..]);
                vy.CopyTo(output[channel..]);
            }
        }

        for (; channel < row.Length; channel++)
        {
            var x = row[channel];
            var y = (b0 * x) + s1[channel];
            s1[channel] = ((b1 * x) - (a1 * y)) + s2[channel];
            s2[channel] = (b2 * x) - (a2 * y);
            output[channel] = y;
        }
    }

    private void Sweep()
    {
        foreach (ref var value in _state.AsSpan())
        {
            if (Math.Abs(value) < Negligible) value = 0;
        }
    }
}
