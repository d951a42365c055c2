using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Testing;

/// <summary>What every wave estimator keeps to, shown on a planar wave in noise over a square array.</summary>
public abstract class WaveEstimatorLaws
{
    private const int Side = 6;
    private const int ChannelCount = Side * Side;
    private const double PitchMm = 0.4;
    private const double RateHz = 1000;
    private const double RhythmHz = 18;
    private const double Same = 1e-9;

    private static readonly Band Rhythm = new("beta", 14, 22, []);

    /// <summary>A new estimator, not yet prepared.</summary>
    protected abstract IWaveEstimator Create();

    [Fact]
    public void Reset_equals_new()
    {
        var (used, _) = Prepared();
        var (fresh, _) = Prepared();
        _ = ReadAll(used, frame => Frame(frame, seed: 5));
        used.Reset();

        var after = ReadAll(used, frame => Frame(frame, seed: 8));

        Assert.Equal(ReadAll(fresh, frame => Frame(frame, seed: 8)), after);
    }

    [Fact]
    public void Reading_allocates_nothing()
    {
        var (estimator, _) = Prepared();
        Phasors[] frames = [.. Enumerable.Range(0, 20).Select(frame => Frame(frame, seed: 5)), WithMissing(Frame(20, seed: 5), 3)];
        var reading = new Reading();
        foreach (var frame in frames) estimator.Read(frame, ref reading);

        var before = GC.GetAllocatedBytesForCurrentThread();
        foreach (var frame in frames) estimator.Read(frame, ref reading);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(2.5)]
    [InlineData(-1.7)]
    public void A_phase_common_to_all_channels_changes_neither_direction_nor_evidence(double radians)
    {
        var (sine, cosine) = Portable.SinCos(radians);

        var changed = Last(frame => Changed(Frame(frame, seed: 5), (re, im) => ((re * cosine) - (im * sine), (re * sine) + (im * cosine))));

        AssertAlike(Last(frame => Frame(frame, seed: 5)), changed);
    }

    [Theory]
    [InlineData(0.001)]
    [InlineData(37)]
    public void A_gain_common_to_all_channels_changes_neither_direction_nor_evidence(double gain)
    {
        var changed = Last(frame => Changed(Frame(frame, seed: 5), (re, im) => (re * gain, im * gain)));

        AssertAlike(Last(frame => Frame(frame, seed: 5)), changed);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(7)]
    public void A_few_missing_channels_leave_the_reading_finite(int count)
    {
        var reading = Last(frame => WithMissing(Frame(frame, seed: 5), count));

        Assert.True(reading.IsValid);
        Assert.Equal((double)(ChannelCount - count) / ChannelCount, reading.ObservedShare);
        Assert.True(double.IsFinite(reading.Statistic));
        Assert.True(double.IsFinite(reading.DirectionDegrees));
    }

    [Fact]
    public void With_more_than_a_fifth_missing_a_frame_says_nothing()
    {
        var reading = Last(frame => WithMissing(Frame(frame, seed: 5), 8));

        Assert.False(reading.IsValid);
        Assert.Equal(double.NegativeInfinity, reading.Statistic);
        Assert.Equal(WaveKind.None, reading.Kind);
    }

    [Theory]
    [InlineData(90)]
    [InlineData(-33.3)]
    [InlineData(271.5)]
    public void A_turned_layout_turns_the_direction_by_exactly_that_and_nothing_else(double degrees)
    {
        var plain = Last(frame => Frame(frame, seed: 5));

        var turned = Last(frame => Frame(frame, seed: 5), degrees);

        Assert.Equal(plain.Statistic, turned.Statistic);
        Assert.Equal(plain.Kind, turned.Kind);
        Assert.InRange(turned.DirectionDegrees, 0, 360);
        Assert.Equal(0, Math.IEEERemainder(turned.DirectionDegrees - plain.DirectionDegrees - degrees, 360), Same);
    }

    private static void AssertAlike(Reading expected, Reading actual)
    {
        Assert.True(double.IsFinite(expected.Statistic));
        Assert.Equal(expected.Kind, actual.Kind);
        Assert.Equal(expected.Statistic, actual.Statistic, Same * Math.Max(1, Math.Abs(expected.Statistic)));
        Assert.Equal(expected.DirectionDegrees, actual.DirectionDegrees, Same * 360);
        Assert.Equal(expected.DirectionStandardErrorDegrees, actual.DirectionStandardErrorDegrees, Same * 360);
    }

    // A wave of 2.4 mm towards 35° at 18 Hz, 10 dB over independent noise.
    private static Phasors Frame(int frame, ulong seed)
    {
        var lots = new SplitMix64(seed + (ulong)frame);
        var row = frame * 4L;
        var phasors = new Phasors(ChannelCount) { At = new RowInstant(row, row, row / RateHz) };
        var (sine, cosine) = Portable.SinCos(35 * Math.PI / 180);
        var waveNumber = 2 * Math.PI / 2.4;
        for (var i = 0; i < ChannelCount; i++)
        {
            var (x, y) = (i % Side * PitchMm, i / Side * PitchMm);
            var phase = (2 * Math.PI * RhythmHz * row / RateHz) - (waveNumber * ((cosine * x) + (sine * y)));
            var (im, re) = Portable.SinCos(phase);
            phasors.Re[i] = re + (0.22 * lots.NextNormal());
            phasors.Im[i] = im + (0.22 * lots.NextNormal());
        }

        phasors.Validity.Fill(Validity.Observed);
        return phasors;
    }

    private static Phasors WithMissing(Phasors phasors, int count)
    {
        for (var i = 0; i < count; i++)
        {
            var channel = ((i * 5) + 2) % ChannelCount;
            phasors.Validity[channel] = i % 2 == 0 ? Validity.Bridged : Validity.Invalid;
            phasors.Re[channel] = i % 2 == 0 ? 50 : double.NaN;
        }

        return phasors;
    }

    private static Phasors Changed(Phasors phasors, Func<double, double, (double Re, double Im)> change)
    {
        for (var i = 0; i < phasors.ChannelCount; i++) (phasors.Re[i], phasors.Im[i]) = change(phasors.Re[i], phasors.Im[i]);
        return phasors;
    }

    private static Reading[] ReadAll(IWaveEstimator estimator, Func<int, Phasors> frames)
    {
        var readings = new Reading[10];
        for (var i = 0; i < readings.Length; i++) estimator.Read(frames(i), ref readings[i]);
        return readings;
    }

    private Reading Last(Func<int, Phasors> frames, double rotationDegrees = 0) => ReadAll(Prepared(rotationDegrees).Estimator, frames)[^1];

    private (IWaveEstimator Estimator, int Every) Prepared(double rotationDegrees = 0)
    {
        var electrodes = Enumerable.Range(0, ChannelCount)
            .Select(i => new Electrode($"r{i / Side}c{i % Side}", i % Side * PitchMm, i / Side * PitchMm));
        var layout = new Layout([.. electrodes], rotationDegrees);
        var format = new StreamFormat(
            "array", RateHz, WireFormat.Float32, [.. layout.Electrodes.Select(electrode => new ChannelFormat(electrode.Channel, "microvolts"))]);
        var estimator = Create();
        var every = estimator.Prepare(format, Rhythm, layout, Calibration.None("patch", "beta"));
        return (estimator, every);
    }
}
