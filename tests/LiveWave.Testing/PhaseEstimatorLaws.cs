using LiveWave.Abstractions;

namespace LiveWave.Testing;

/// <summary>What every phase estimator owes the loop. Inherit, create one, hand it a calibration.</summary>
public abstract class PhaseEstimatorLaws
{
    private const int SettlingRows = 4000;
    private const double DegreesPerRadian = 180 / Math.PI;

    /// <summary>Rows per second of the law's streams.</summary>
    protected const double RateHz = 1000;

    /// <summary>Channels of the law's streams: no multiple of a vector, so that rows have a tail.</summary>
    protected const int ChannelCount = 11;

    /// <summary>The band: its centre is the sine's frequency.</summary>
    protected static Band Band { get; } = new("alpha", 8, 12, [0, 5, 20]);

    /// <summary>A new estimator, not prepared.</summary>
    protected abstract IPhaseEstimator Create();

    /// <summary>What it needs to know of <see cref="Band"/> at <see cref="RateHz"/>.</summary>
    protected abstract Calibration Calibration(int channelCount);

    /// <summary>How far off the phase of a steady sine at the band's centre may be.</summary>
    protected virtual double MostDegrees => 3;

    [Fact]
    public void What_comes_later_changes_nothing()
    {
        var (one, other) = (Prepared(), Prepared());
        var rows = Rows(600);
        var changed = Rows(600);
        for (var row = 400; row < 600; row++) changed[row].AsSpan().Fill(1e6 * row);

        for (var row = 0; row < 400; row++)
        {
            var phasors = Step(one, rows[row]);
            AssertSame(phasors, Step(other, changed[row]));
        }
    }

    [Fact]
    public void After_a_reset_it_is_as_new()
    {
        var (used, fresh) = (Prepared(), Prepared());
        foreach (var row in Rows(1500)) _ = Step(used, row);

        used.Reset();

        AssertSame(Predict(used, 5), Predict(fresh, 5));
        foreach (var row in Rows(1500))
        {
            AssertSame(Step(used, row), Step(fresh, row));
            AssertSame(Predict(used, 20), Predict(fresh, 20));
        }
    }

    [Fact]
    public void Nothing_is_allocated_once_it_runs()
    {
        var estimator = Prepared();
        var rows = Rows(3000);
        var phasors = new Phasors(ChannelCount);
        Run(estimator, rows, phasors);
        var before = GC.GetAllocatedBytesForCurrentThread();

        Run(estimator, rows, phasors);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(double.NegativeInfinity)]
    [InlineData(double.MaxValue)]
    public void What_is_no_number_stays_in_its_channel_and_never_leaves(double value)
    {
        var (clean, hit) = (Prepared(), Prepared());
        var rows = Rows(4000);

        for (var row = 0; row < rows.Length; row++)
        {
            var untouched = Step(clean, rows[row]);
            if (row is < 40 or (>= 700 and < 740) or (>= 1500 and < 3000)) rows[row][3] = value;
            var touched = Step(hit, rows[row]);
            AssertFinite(touched);
            AssertSame(untouched, touched, except: 3);
            var ahead = Predict(hit, 20);
            AssertFinite(ahead);
            AssertSame(Predict(clean, 20), ahead, except: 3);
        }
    }

    [Fact]
    public void A_row_without_its_sample_is_no_observation()
    {
        var estimator = Prepared();
        foreach (var row in Rows(SettlingRows)) _ = Step(estimator, row);
        var missing = Rows(1)[0];
        missing[3] = double.NaN;

        var now = Step(estimator, missing);

        Assert.NotEqual(Validity.Observed, now.Validity[3]);
        Assert.Equal(Validity.Observed, now.Validity[2]);
        Assert.NotEqual(Validity.Observed, Predict(estimator, 5).Validity[3]);
    }

    [Fact]
    public void Nothing_is_trusted_at_the_first_row()
    {
        var now = Step(Prepared(), Rows(1)[0]);

        Assert.All(now.Validity.ToArray(), validity => Assert.Equal(Validity.Invalid, validity));
    }

    [Fact]
    public void Channels_do_not_influence_each_other()
    {
        var (one, other) = (Prepared(), Prepared());
        foreach (var row in Rows(1500))
        {
            var alone = Step(one, row);
            for (var channel = 0; channel < ChannelCount; channel++) if (channel != 6) row[channel] = (1e4 * channel) - (3 * row[channel]);
            var amongOthers = Step(other, row);
            Assert.Equal(alone.Re[6], amongOthers.Re[6]);
            Assert.Equal(alone.Im[6], amongOthers.Im[6]);
            Assert.Equal(alone.Validity[6], amongOthers.Validity[6]);
        }
    }

    [Fact]
    public void The_phase_of_a_sine_at_the_centre_is_right_once_settled()
    {
        var estimator = Prepared();

        for (var row = 0; row < SettlingRows + 1000; row++)
        {
            var now = Step(estimator, Sine(row));
            if (row < SettlingRows) continue;
            for (var channel = 0; channel < ChannelCount; channel++)
            {
                Assert.InRange(DegreesOff(now, channel, row), -MostDegrees, MostDegrees);
                Assert.Equal(Validity.Observed, now.Validity[channel]);
            }
        }
    }

    [Fact]
    public void A_prediction_over_no_time_is_now()
    {
        var estimator = Prepared();
        foreach (var row in Rows(300))
        {
            var now = Step(estimator, row);
            AssertSame(now, Predict(estimator, 0));
        }
    }

    [Fact]
    public void A_prediction_of_a_sine_is_ahead_by_its_horizon()
    {
        var estimator = Prepared();
        for (var row = 0; row < SettlingRows; row++) _ = Step(estimator, Sine(row));

        foreach (var horizon in Band.HorizonSamples)
        {
            var then = Predict(estimator, horizon);
            for (var channel = 0; channel < ChannelCount; channel++)
            {
                Assert.InRange(DegreesOff(then, channel, SettlingRows - 1 + horizon), -MostDegrees, MostDegrees);
            }
        }
    }

    [Fact]
    public void A_prediction_says_from_which_row_it_was_made()
    {
        var estimator = Prepared();
        var now = new Phasors(ChannelCount) { At = new RowInstant(12, 34, 5.6) };
        estimator.Step(Rows(1)[0], now);

        var then = Predict(estimator, 20);

        Assert.Equal(now.At, then.At);
    }

    private static void Run(IPhaseEstimator estimator, double[][] rows, Phasors phasors)
    {
        foreach (var row in rows)
        {
            estimator.Step(row, phasors);
            estimator.Predict(20, phasors);
        }
    }

    private static double[][] Rows(int count) => Signals.Recording(7, RateHz, count, ChannelCount);

    private static double Radians(int channel, double row) => (2 * Math.PI * Band.CentreHz / RateHz * row) + (0.5 * channel);

    private static double[] Sine(int row)
    {
        var values = new double[ChannelCount];
        for (var channel = 0; channel < ChannelCount; channel++) values[channel] = (40 * channel) + (20 * Math.Cos(Radians(channel, row)));
        return values;
    }

    private static double DegreesOff(Phasors phasors, int channel, double row)
    {
        var off = Math.Atan2(phasors.Im[channel], phasors.Re[channel]) - Radians(channel, row);
        return DegreesPerRadian * Math.IEEERemainder(off, 2 * Math.PI);
    }

    private static void AssertFinite(Phasors phasors)
    {
        for (var channel = 0; channel < phasors.ChannelCount; channel++)
        {
            Assert.True(double.IsFinite(phasors.Re[channel]) && double.IsFinite(phasors.Im[channel]));
        }
    }

    private static void AssertSame(Phasors expected, Phasors actual, int except = -1)
    {
        for (var channel = 0; channel < expected.ChannelCount; channel++)
        {
            if (channel == except) continue;
            Assert.Equal(expected.Re[channel], actual.Re[channel]);
            Assert.Equal(expected.Im[channel], actual.Im[channel]);
            Assert.Equal(expected.VariancePerAxis[channel], actual.VariancePerAxis[channel]);
            Assert.Equal(expected.Validity[channel], actual.Validity[channel]);
        }
    }

    private static Phasors Step(IPhaseEstimator estimator, double[] row)
    {
        var phasors = new Phasors(ChannelCount);
        estimator.Step(row, phasors);
        return phasors;
    }

    private static Phasors Predict(IPhaseEstimator estimator, int horizonSamples)
    {
        var phasors = new Phasors(ChannelCount);
        estimator.Predict(horizonSamples, phasors);
        return phasors;
    }

    private IPhaseEstimator Prepared()
    {
        var estimator = Create();
        estimator.Prepare(Signals.Format(RateHz, ChannelCount), Band, Calibration(ChannelCount));
        return estimator;
    }
}
