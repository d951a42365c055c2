using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>At 100 rows a second 50 ms are 5 rows, 1 s are 100.</summary>
public sealed class ChannelGateTests
{
    private const int ChannelCount = 3;
    private const double Missing = double.NaN;

    private readonly ChannelGate _gate = new(ChannelCount, 100, new GateHolds(0.1, 0.03, 0.05));

    [Fact]
    public void After_the_first_sample_a_channel_is_invalid_for_the_start_hold()
    {
        Give(Missing, 7);
        Give(1, 10);
        Assert.Equal(Validity.Invalid, Mark());

        Give(1);

        Assert.Equal(Validity.Observed, Mark());
    }

    [Fact]
    public void A_short_gap_is_bridged_up_to_its_fiftieth_millisecond()
    {
        Give(1, 11);

        for (var row = 0; row < 5; row++)
        {
            Give(Missing);
            Assert.Equal(Validity.Bridged, Mark());
        }

        Give(1);
        Assert.Equal(Validity.Observed, Mark());
    }

    [Fact]
    public void A_longer_gap_is_invalid_and_held_afterwards()
    {
        Give(1, 11);

        Give(Missing, 6);
        Assert.Equal(Validity.Invalid, Mark());

        Give(1, 3);
        Assert.Equal(Validity.Invalid, Mark());
        Give(1);
        Assert.Equal(Validity.Observed, Mark());
    }

    [Fact]
    public void Rows_without_a_sample_do_not_shorten_a_hold()
    {
        Give(1, 10);
        Give(Missing, 4);

        Give(1);

        Assert.Equal(Validity.Observed, Mark());
        _gate.Reset();
        Give(1, 9);
        Give(Missing, 4);
        Give(1);
        Assert.Equal(Validity.Invalid, Mark());
    }

    [Fact]
    public void A_channel_begins_anew_when_its_gap_exceeds_a_second_and_again_with_its_next_sample()
    {
        Give(1, 11);
        Give(Missing, 100);
        Assert.DoesNotContain(1, _gate.Begun.ToArray());

        Give(Missing);
        Assert.Equal([1], _gate.Begun.ToArray());
        Give(Missing);
        Assert.Empty(_gate.Begun.ToArray());
        Give(5);
        Assert.Equal([1], _gate.Begun.ToArray());

        Give(5, 4);
        Assert.Equal(Validity.Invalid, Mark());
        Give(5);
        Assert.Equal(Validity.Observed, Mark());
    }

    [Fact]
    public void A_missing_sample_is_held_at_the_last_one()
    {
        Give(Missing);
        Assert.Equal(0, _gate.Held[1]);
        Give(4);

        Give(Missing, 3);

        Assert.Equal(4, _gate.Held[1]);
        Assert.Equal(3, _gate.Skipped[1]);
    }

    [Theory]
    [InlineData(double.PositiveInfinity)]
    [InlineData(double.NegativeInfinity)]
    [InlineData(1.01e100)]
    public void A_value_that_no_electrode_delivers_counts_as_missing(double value)
    {
        Give(4);

        Give(value);

        Assert.Equal(4, _gate.Held[1]);
        Assert.Equal(1, _gate.Skipped[1]);
    }

    // The middle channel gets the value, its neighbours are always there.
    private void Give(double value, int rows = 1)
    {
        for (var row = 0; row < rows; row++) _gate.Take([2, value, 3]);
    }

    private Validity Mark()
    {
        var validity = new Validity[ChannelCount];
        _gate.Mark(validity);
        return validity[1];
    }
}
