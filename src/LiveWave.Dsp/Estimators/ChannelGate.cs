using System.Runtime.Intrinsics;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Keeps account, per channel, of samples that are missing: what a filter is fed instead, how long the gap is, and what
/// the phasor is worth.</summary>
/// <remarks>Phase study, sections 7 and 18. Rows are padded (<see cref="RowLength"/>); what lies beyond the channels counts as
/// zero, always present. Lane by lane: channels do not touch each other.</remarks>
internal sealed class ChannelGate
{
    private const double BridgeSeconds = 0.05;   // longer than this nobody should rely on a model alone (study, section 18)
    private const double ForgetSeconds = 1;      // after this long begin anew (study, section 7)
    private const double LargestValue = 1e100;   // no voltage is; squares of what passes stay finite
    private const double Rounding = 1e-6;        // 0.3 s at 1000 Hz are 300 rows, whatever the last bit of the product says

    private readonly double _bridgeRows;
    private readonly int _channelCount;
    private readonly GateHolds _holds;
    private readonly double _rateHz;
    private readonly double[] _row;
    private readonly double[] _held;
    private readonly double[] _skipped;
    private readonly double[] _hold;             // rows with a sample that are still to be marked invalid, this one included
    private readonly int[] _begun;
    private int _begunCount;

    /// <summary>Makes room; nothing was seen yet.</summary>
    /// <param name="channelCount">At least 1.</param>
    /// <param name="rateHz">Rows per second.</param>
    /// <param name="holds">How long phasors stay invalid after a start or a gap.</param>
    internal ChannelGate(int channelCount, double rateHz, GateHolds holds)
    {
        _channelCount = channelCount;
        _rateHz = rateHz;
        _holds = holds;
        _bridgeRows = RowsWithin(BridgeSeconds);
        ForgetRows = RowsWithin(ForgetSeconds);
        var length = RowLength.Padded(channelCount);
        _row = new double[length];
        _held = new double[length];
        _skipped = new double[length];
        _hold = new double[length];
        _begun = new int[channelCount];
        Reset();
    }

    /// <summary>Gaps of up to so many rows are run through; after longer ones a channel begins anew.</summary>
    internal int ForgetRows { get; }

    /// <summary>The row with missing samples replaced by the last one of the channel; zero before the first. Padded.</summary>
    internal ReadOnlySpan<double> Held => _held;

    /// <summary>Rows since the channel's last sample, 0 = this row has one, infinite before the first. Padded.</summary>
    internal ReadOnlySpan<double> Skipped => _skipped;

    /// <summary>Channels that begin anew at this row: their gap has become too long, or their first sample after it is here.</summary>
    internal ReadOnlySpan<int> Begun => _begun.AsSpan(0, _begunCount);

    /// <summary>True if at this row every channel has a sample and none is held: nearly always, and then much is simpler.</summary>
    internal bool IsOrdinary { get; private set; }

    /// <summary>Takes one row.</summary>
    /// <param name="row">One value a channel; NaN, infinite and absurdly large values count as missing.</param>
    internal void Take(ReadOnlySpan<double> row)
    {
        row.CopyTo(_row);
        _begunCount = 0;
        IsOrdinary = true;
        var values = Lanes.Of(_row);
        var held = Lanes.Of(_held);
        var skipped = Lanes.Of(_skipped);
        var hold = Lanes.Of(_hold);
        var largest = Vector256.Create(LargestValue);
        for (var i = 0; i < values.Length; i++)
        {
            if (Vector256.LessThanOrEqualAll(Vector256.Abs(values[i]), largest)
                && Vector256.EqualsAll(skipped[i] + hold[i], Vector256<double>.Zero))
            {
                held[i] = values[i];
                continue;
            }

            IsOrdinary = false;
            var first = i * Vector256<double>.Count;
            for (var channel = first; channel < first + Vector256<double>.Count; channel++) Account(channel);
        }
    }

    /// <summary>Says what each channel's phasor rests on at this row.</summary>
    /// <param name="validity">Filled, one a channel.</param>
    internal void Mark(Span<Validity> validity)
    {
        if (IsOrdinary)
        {
            validity.Fill(Validity.Observed);
            return;
        }

        var skipped = _skipped.AsSpan(0, validity.Length);
        var hold = _hold.AsSpan(0, validity.Length);
        for (var channel = 0; channel < validity.Length; channel++)
        {
            validity[channel] = hold[channel] > 0 || skipped[channel] > _bridgeRows ? Validity.Invalid
                : skipped[channel] > 0 ? Validity.Bridged
                : Validity.Observed;
        }
    }

    /// <summary>Back to rest: nothing was seen yet.</summary>
    internal void Reset()
    {
        _begunCount = 0;
        IsOrdinary = false;
        _held.AsSpan().Clear();
        _hold.AsSpan().Clear();
        _skipped.AsSpan(0, _channelCount).Fill(double.PositiveInfinity);
    }

    private void Account(int channel)
    {
        var gap = _skipped[channel];
        if (!(Math.Abs(_row[channel]) <= LargestValue))     // so that NaN is missing too
        {
            _skipped[channel] = gap + 1;
            if (gap == ForgetRows) _begun[_begunCount++] = channel;
            return;
        }

        _held[channel] = _row[channel];
        _skipped[channel] = 0;
        _hold[channel] = Math.Max(_hold[channel] - 1, HoldAfter(gap));
        if (gap > ForgetRows) _begun[_begunCount++] = channel;
    }

    private double HoldAfter(double gap)
    {
        if (gap <= _bridgeRows) return 0;
        var seconds = gap <= ForgetRows ? _holds.AfterGapSeconds
            : double.IsInfinity(gap) ? _holds.StartSeconds
            : _holds.AfterForgettingSeconds;
        return Math.Ceiling((seconds * _rateHz) - Rounding);
    }

    private int RowsWithin(double seconds) => (int)Math.Floor((seconds * _rateHz) + Rounding);
}
