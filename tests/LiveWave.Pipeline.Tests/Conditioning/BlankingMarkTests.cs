using FsCheck.Xunit;

namespace LiveWave.Pipeline.Tests;

public sealed class BlankingMarkTests
{
    [Fact]
    public void Rows_are_blank_from_the_due_row_on_for_as_long_as_the_sheet_says()
    {
        var blanking = new BlankingMark(rows: 3);
        blanking.Add(dueIndex: 10);

        var blank = Enumerable.Range(0, 20).Where(index => blanking.Covers(index));

        Assert.Equal([10, 11, 12], blank);
    }

    [Fact]
    public void A_sheet_that_blanks_nothing_blanks_nothing()
    {
        var blanking = new BlankingMark(rows: 0);
        blanking.Add(5);

        Assert.DoesNotContain(Enumerable.Range(0, 20), index => blanking.Covers(index));
    }

    [Property(Replay = "2026,1201", MaxTest = 200)]
    public bool Windows_that_overlap_cover_the_same_rows_as_each_alone(byte[] dues, byte length)
    {
        var rows = 1 + (length % 20);
        var blanking = new BlankingMark(rows);
        foreach (var due in dues.Take(60)) blanking.Add(due);

        return Enumerable.Range(0, 300).All(index => blanking.Covers(index) == dues.Take(60).Any(due => index >= due && index < due + rows));
    }

    [Fact]
    public void More_windows_than_there_is_room_for_blank_rather_too_much()
    {
        var blanking = new BlankingMark(rows: 2);
        for (var due = 0; due < 100; due++) blanking.Add(1000 + (10 * due));

        var blank = Enumerable.Range(0, 2100).Where(index => blanking.Covers(index)).ToHashSet();

        Assert.Subset(blank, Enumerable.Range(0, 100).Select(due => 1000 + (10 * due)).ToHashSet());
    }
}
