using LiveWave.Abstractions;

namespace LiveWave.App.Tests;

public sealed class TruthComparisonTests
{
    private static readonly TruthRow[] Truth =
    [
        new(OnsetSeconds: 1, DurationSeconds: 0.4, "planar", DirectionDegrees: 350, IsStrong: true),
        new(OnsetSeconds: 3, DurationSeconds: 0.4, "planar", DirectionDegrees: 90, IsStrong: true),
    ];

    [Fact]
    public void A_wave_that_had_not_ended_when_the_run_ended_counts_neither_as_missed_nor_as_nothing()
    {
        var comparison = new TruthComparison(Truth, [Wave(1.1, 1.4, 10), Wave(3.1, 3.2, 90)], rotationDegrees: 0, firstStamp: 100, lastStamp: 103.2);

        Assert.Equal((1, 1, 0), (comparison.Strong, comparison.StrongFound, comparison.Stray));
        Assert.Equal(20, comparison.MedianDirectionErrorDegrees, 9);
        Assert.Equal(100, comparison.MedianDelayMs, 6);
    }

    [Fact]
    public void A_turned_layout_turns_what_is_found_and_not_the_truth()
    {
        var comparison = new TruthComparison(Truth, [Wave(3.1, 3.2, 180)], rotationDegrees: 90, firstStamp: 100, lastStamp: 110);

        Assert.Equal(0, comparison.MedianDirectionErrorDegrees, 9);
    }

    [Fact]
    public void An_event_where_nothing_was_put_in_is_stray()
    {
        var comparison = new TruthComparison(Truth, [Wave(2.1, 2.3, 90)], rotationDegrees: 0, firstStamp: 100, lastStamp: 110);

        Assert.Equal((0, 1), (comparison.StrongFound, comparison.Stray));
    }

    private static WaveEvent Wave(double passed, double last, double degrees) => new()
    {
        Kind = WaveKind.Planar,
        Passed = new RowInstant(0, 0, 100 + passed),
        Last = new RowInstant(0, 0, 100 + last),
        DirectionDegrees = degrees,
    };
}
