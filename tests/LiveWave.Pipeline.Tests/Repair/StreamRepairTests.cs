using FsCheck.Xunit;
using LiveWave.Abstractions;
using LiveWave.Testing;

namespace LiveWave.Pipeline.Tests;

public sealed class StreamRepairTests
{
    private static readonly StreamFormat Format = new("array", 1000, WireFormat.Float32, [new("a", "microvolts")]);

    [Fact]
    public void A_steady_stream_is_numbered_as_it_came()
    {
        var rows = Repair([10.000, 10.001, 10.002], blockRows: 2);

        Assert.Equal([0L, 1, 2], rows.Select(row => row.Index));
        Assert.Equal([0L, 1, 2], rows.Select(row => row.Received));
        Assert.All(rows, row => Assert.Equal(RowBreaks.None, row.Breaks));
    }

    [Fact]
    public void A_gap_moves_indices_and_nothing_else()
    {
        var stamps = new[] { 10.000, 10.001, 10.006, 10.007 };

        var rows = Repair(stamps, blockRows: 1000);

        Assert.Equal([0L, 1, 6, 7], rows.Select(row => row.Index));
        Assert.Equal([0L, 1, 2, 3], rows.Select(row => row.Received));
        Assert.Equal(stamps, rows.Select(row => row.StampSeconds));
        Assert.Equal([RowBreaks.None, RowBreaks.None, RowBreaks.Gap, RowBreaks.None], rows.Select(row => row.Breaks));
    }

    [Fact]
    public void What_was_lost_is_counted()
    {
        var repair = new StreamRepair(Format);

        _ = Repair([10.000, 10.005, 10.006, 10.016], blockRows: 3, repair);

        Assert.Equal(2, repair.Gaps);
        Assert.Equal(4 + 9, repair.LostRows);
    }

    [Fact]
    public void A_stream_that_begins_anew_is_a_restart_and_no_gap()
    {
        var feed = new FakeFeed(Format, Rows(4), [10.000, 10.001, 3.000, 3.001]).RestartBefore(2);

        var rows = Repair(feed, blockRows: 10);

        Assert.Equal([RowBreaks.None, RowBreaks.None, RowBreaks.Restart, RowBreaks.None], rows.Select(row => row.Breaks));
        Assert.Equal([0L, 1, 2, 3], rows.Select(row => row.Index));
    }

    [Fact]
    public void Stamps_that_go_back_far_are_a_restart_even_if_the_feed_did_not_notice()
    {
        var rows = Repair([10.000, 10.001, 3.000], blockRows: 10);

        Assert.Equal(RowBreaks.Restart, rows[2].Breaks);
    }

    [Fact]
    public void Stamps_that_tremble_at_every_packet_cost_a_false_gap_at_a_quarter_of_them_at_most()
    {
        var tremble = new[] { 0.006, 0.004, 0.002, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0 };
        var stamps = Enumerable.Range(0, 20_000).Select(i => 10 + (0.001 * i) + (i < 20 ? 0 : tremble[i % 20])).ToArray();
        var repair = new StreamRepair(Format);

        var rows = Repair(stamps, blockRows: 20, repair);

        Assert.Equal(20_000, rows.Count);
        Assert.InRange(repair.Gaps, 0, 1000 / 4);   // 1000 packets
    }

    [Fact]
    public void A_rate_that_is_a_little_off_makes_no_gap()
    {
        var repair = new StreamRepair(Format);

        _ = Repair([.. Enumerable.Range(0, 200_000).Select(i => 10 + (0.0010001 * i))], blockRows: 100, repair);

        Assert.Equal(0, repair.Gaps);
    }

    [Theory]
    [InlineData(1e300)]
    [InlineData(8000.0)]
    public void A_stamp_that_jumps_beyond_all_counting_is_a_restart(double stamp)
    {
        var rows = Repair([10.000, 10.001, stamp], blockRows: 10);

        Assert.Equal(RowBreaks.Restart, rows[2].Breaks);
        Assert.Equal(2, rows[2].Index);
    }

    [Fact]
    public void A_stamp_that_is_no_number_is_the_one_after_the_last()
    {
        var rows = Repair([10.000, 10.001, double.NaN, 10.003], blockRows: 10);

        Assert.Equal([0L, 1, 2, 3], rows.Select(row => row.Index));
        Assert.Equal(10.002, rows[2].StampSeconds, 9);
    }

    [Property(Replay = "2026,1201", MaxTest = 200)]
    public bool Rows_are_placed_alike_whatever_the_block_size(byte[] steps, byte blockRows)
    {
        var stamps = new double[steps.Length + 1];
        stamps[0] = 50;
        for (var i = 0; i < steps.Length; i++) stamps[i + 1] = stamps[i] + (0.001 * (1 + (steps[i] % 5 == 0 ? steps[i] : 0)));

        return Repair(stamps, 1 + blockRows).SequenceEqual(Repair(stamps, 1));
    }

    private static double[][] Rows(int count) => [.. Enumerable.Range(0, count).Select(i => new double[] { i })];

    private static List<RowInstant> Repair(double[] stamps, int blockRows, StreamRepair? repair = null) =>
        Repair(new FakeFeed(Format, Rows(stamps.Length), stamps), blockRows, repair);

    private static List<RowInstant> Repair(FakeFeed feed, int blockRows, StreamRepair? repair = null)
    {
        repair ??= new StreamRepair(Format);
        var block = new SampleBlock(Format, blockRows);
        var rows = new RepairedRows(blockRows);
        var placed = new List<RowInstant>();
        while (feed.Pull(block, TimeSpan.Zero) == PullResult.Samples)
        {
            repair.Apply(block, rows);
            for (var i = 0; i < rows.Count; i++) placed.Add(rows[i]);
        }

        return placed;
    }
}
