using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Gives every received row its corrected stamp, its place on the sampling grid, and a gap or restart flag.</summary>
/// <remarks>Pure and causal: the same for a live stream, a file and a re-run. The stamps of a file are on the run's own clock
/// (identity); nothing depends on block borders. A gap must show against the row before and against a grid that follows the stamps
/// slowly: stamps that tremble, as those of packets do, then cost a false gap at one packet in five (measured, 6 periods of tremble at
/// every 20 rows), not at each. Removing the tremble itself, and with it these, comes with live streams. Allocates nothing.</remarks>
public sealed class StreamRepair
{
    /// <summary>Stamps further apart than this many sampling periods may have lost rows between them.</summary>
    public const double GapPeriods = 1.5;

    /// <summary>A stamp that goes back by more than this is another clock: the stream began anew.</summary>
    public const double RestartBackSeconds = 1.0;

    /// <summary>A jump ahead by more than this is no gap that anything could be counted across: the stream began anew.</summary>
    public const double RestartAheadSeconds = 3600;

    // Of the distance a row: follows a rate that is off by 100 ppm to a tenth of a period, and hardly heeds a packet of 20 rows.
    private const double GridFollows = 1e-3;

    private readonly double _rateHz;
    private bool _started;
    private long _lastIndex;
    private double _lastStamp;
    private double _gridStamp;

    /// <summary>Makes ready for a stream.</summary>
    /// <param name="format">Its rate counts.</param>
    public StreamRepair(StreamFormat format)
    {
        ArgumentNullException.ThrowIfNull(format);
        _rateHz = format.NominalRateHz;
    }

    /// <summary>Rows lost so far.</summary>
    public long LostRows { get; private set; }

    /// <summary>Gaps so far.</summary>
    public long Gaps { get; private set; }

    /// <summary>Restarts so far.</summary>
    public long Restarts { get; private set; }

    /// <summary>Places the rows of a block.</summary>
    /// <param name="block">As received.</param>
    /// <param name="rows">Filled.</param>
    public void Apply(SampleBlock block, RepairedRows rows)
    {
        rows.Count = block.Count;
        for (var i = 0; i < block.Count; i++)
        {
            rows.Set(i, Place(block.FirstReceived + i, block.RawStampSeconds(i), i == 0 && block.AfterRestart));
        }
    }

    private RowInstant Place(long received, double stamp, bool restarted)
    {
        if (!_started)
        {
            _started = true;
            Anchor(0, stamp);
            return new RowInstant(received, 0, stamp);
        }

        if (!double.IsFinite(stamp)) stamp = _lastStamp + (1 / _rateHz);
        var ahead = stamp - _lastStamp;
        if (restarted || ahead < -RestartBackSeconds || ahead > RestartAheadSeconds)
        {
            Restarts++;
            Anchor(_lastIndex + 1, stamp);
            return new RowInstant(received, _lastIndex, stamp, RowBreaks.Restart);
        }

        _gridStamp += 1 / _rateHz;
        var lost = ahead * _rateHz > GapPeriods ? (long)Math.Floor(((stamp - _gridStamp) * _rateHz) + 0.5) : 0;
        if (lost <= 0)
        {
            _gridStamp += GridFollows * (stamp - _gridStamp);
            _lastStamp = stamp;
            return new RowInstant(received, ++_lastIndex, stamp);
        }

        LostRows += lost;
        Gaps++;
        Anchor(_lastIndex + 1 + lost, stamp);
        return new RowInstant(received, _lastIndex, stamp, RowBreaks.Gap);
    }

    private void Anchor(long index, double stamp)
    {
        _lastIndex = index;
        _lastStamp = stamp;
        _gridStamp = stamp;
    }
}
