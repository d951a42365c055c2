using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class LocalFrequencyTests
{
    private static readonly Layout Array = WaveFrames.Grid(4, 4);

    [Fact]
    public void The_first_frame_has_none()
    {
        Assert.Equal(double.NaN, WaveFrames.Read(Array, Frame(0, 10)).LocalFrequencyHz);
    }

    [Theory]
    [InlineData(10)]
    [InlineData(11.5)]
    [InlineData(-3)]
    public void It_is_the_advance_of_the_phase_over_the_time_between(double hertz)
    {
        Assert.Equal(hertz, WaveFrames.Read(Array, Frame(100, hertz), Frame(104, hertz)).LocalFrequencyHz, 1e-9);
    }

    [Fact]
    public void A_short_gap_counts_with_its_true_length()
    {
        Assert.Equal(10, WaveFrames.Read(Array, Frame(100, 10), Frame(140, 10)).LocalFrequencyHz, 1e-9);
    }

    [Theory]
    [InlineData(142)]       // longer than half a period at 12 Hz: 41.7 ms
    [InlineData(100)]
    [InlineData(60)]
    public void Too_long_a_gap_or_a_step_back_has_none(long index)
    {
        Assert.Equal(double.NaN, WaveFrames.Read(Array, Frame(100, 10), Frame(index, 10)).LocalFrequencyHz);
    }

    [Fact]
    public void A_restart_has_none()
    {
        var after = Frame(104, 10);
        after.At = after.At with { Breaks = RowBreaks.Restart };

        Assert.Equal(double.NaN, WaveFrames.Read(Array, Frame(100, 10), after).LocalFrequencyHz);
    }

    [Fact]
    public void Odd_channels_and_missing_ones_do_not_move_the_median()
    {
        var (before, after) = (Frame(100, 10), Frame(104, 10));
        for (var i = 0; i < 3; i++) (after.Re[i], after.Im[i]) = (-after.Im[i], after.Re[i]);
        before.Validity[8] = Validity.Bridged;
        after.Validity[9] = Validity.Bridged;

        Assert.Equal(10, WaveFrames.Read(Array, before, after).LocalFrequencyHz, 1e-9);
    }

    [Fact]
    public void An_invalid_frame_is_remembered_for_the_next()
    {
        var broken = Frame(104, 10);
        for (var i = 0; i < 8; i++) broken.Validity[i] = Validity.Invalid;

        var reading = WaveFrames.Read(Array, Frame(100, 10), broken, Frame(108, 10));

        Assert.Equal(10, reading.LocalFrequencyHz, 1e-9);
    }

    private static Phasors Frame(long index, double hertz) =>
        WaveFrames.Frame(Array, WaveFrames.Plane(2, 70, 2 * Math.PI * hertz * index / WaveFrames.RateHz), index: index);
}
