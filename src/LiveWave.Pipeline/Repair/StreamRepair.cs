using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>Gives every received row its corrected stamp, its place on the sampling grid, and a gap or restart flag.</summary>
/// <remarks>Pure and causal: the same for a live stream, a file and a re-run. The stamps of a file are on the run's own clock
/// (identity); rows are told apart from the one before, so nothing depends on block borders. Allocates nothing.</remarks>
public sealed class StreamRepair
{
    /// <summary>Stamps further apart than this many sampling periods have lost rows between them.</summary>
    public const double GapPeriods = 1.5;

    /// <summary>A stamp that goes back by more than this is another clock: the stream began anew.</summary>
    public const double RestartBackSeconds = 1.0;

    private readonly double _rateHz;
    private bool _started;
    private long _lastIndex;
    private double _lastStamp;

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
            _lastIndex = 0;
            _lastStamp = stamp;
            return new RowInstant(received, 0, stamp);
        }

        var step = (stamp - _lastStamp) * _rateHz;
        var breaks = RowBreaks.None;
        long lost = 0;
        if (restarted || stamp < _lastStamp - RestartBackSeconds)
        {
            breaks = RowBreaks.Restart;
            Restarts++;
        }
        else if (step > GapPeriods)
        {
            lost = (long)Math.Floor(step + 0.5) - 1;
            breaks = RowBreaks.Gap;
            LostRows += lost;
            Gaps++;
        }

        _lastIndex += 1 + lost;
        _lastStamp = stamp;
        return new RowInstant(received, _lastIndex, stamp, breaks);
    }
}
