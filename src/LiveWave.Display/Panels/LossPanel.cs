namespace LiveWave.Display;

/// <summary>One line of what is missing: lost on the way in, blanked after own pulses, and what the view itself did not keep up with.</summary>
internal static class LossPanel
{
    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        var run = picture.Run;
        var missed = picture.Missed == 0 ? "" : $"  view missed {picture.Missed}";
        var x = grid.Write(region.X, region.Y, region.Columns, "LOST ", Slate.Strong, CellStyle.Bold);
        var text = $"{run.LostRows} of {run.Rows + run.LostRows} rows in {Words.Count(run.Gaps, "gap")}  blanked {run.BlankedRows}{missed}";
        grid.Write(x, region.Y, region.X + region.Columns - x, text, run.LostRows + picture.Missed > 0 ? Slate.Strong : Slate.Faint);
    }
}
