using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>The latency budget: median, 99 % and limit of each stage, and where there is room a bar of the 99 % against the limit.</summary>
internal static class BudgetPanel
{
    private const int NameColumns = 20;
    private const int NumberColumns = 7;
    private const int TableColumns = NameColumns + (3 * NumberColumns);
    private const int BarColumns = 16;

    private static readonly string[] Names =
    [
        "block → judged", "acquired → received", "received → phased", "phased → read", "read → decided", "decided → due", "due → sent",
    ];

    // The stages to show, most telling first: every block, punctuality, the stages with limits, the rest.
    private static readonly int[] Order = [0, 6, 2, 3, 4, 1, 5];

    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        grid.Write(region.X, region.Y, NameColumns, "BUDGET", Slate.Strong, CellStyle.Bold);
        grid.Write(region.X + 7, region.Y, NameColumns, "ms", Slate.Text);
        Number(grid, region, region.Y, 0, "median", Slate.Faint);
        Number(grid, region, region.Y, 1, "99 %", Slate.Faint);
        Number(grid, region, region.Y, 2, "limit", Slate.Faint);
        var shown = Order.Take(region.Rows - 1).Order().ToList();
        for (var i = 0; i < shown.Count; i++) Line(grid, region, region.Y + 1 + i, Names[shown[i]], picture.Ledger.Stages[shown[i]]);
    }

    private static void Line(CellGrid grid, Region region, int y, string name, StageHistogram stage)
    {
        var isOver = stage.PercentileMs(99) > stage.LimitMs;
        var style = isOver ? CellStyle.Bold : CellStyle.Plain;
        grid.Write(region.X, y, NameColumns, name, Slate.Faint);
        Number(grid, region, y, 0, Words.Milliseconds(stage.PercentileMs(50)), Slate.Text);
        Number(grid, region, y, 1, Words.Milliseconds(stage.PercentileMs(99)), isOver ? Slate.Strong : Slate.Text, style);
        Number(grid, region, y, 2, double.IsNaN(stage.LimitMs) ? "·" : Words.Milliseconds(stage.LimitMs), Slate.Faint);
        if (isOver) grid.Put(region.X + TableColumns, y, '!', Slate.Strong, CellStyle.Bold);
        if (region.Columns >= TableColumns + 2 + BarColumns && stage.LimitMs > 0) Bar(grid, region.X + TableColumns + 2, y, stage);
    }

    /// <summary>Filled to the median, hatched to 99 %, the last column is the limit.</summary>
    private static void Bar(CellGrid grid, int x, int y, StageHistogram stage)
    {
        var median = Columns(stage.PercentileMs(50) / stage.LimitMs);
        var high = Columns(stage.PercentileMs(99) / stage.LimitMs);
        for (var i = 0; i < BarColumns; i++)
        {
            var glyph = i < median ? '▆' : i < high ? '▂' : ' ';
            if (glyph != ' ') grid.Put(x + i, y, glyph, Slate.Text);
        }

        grid.Put(x + BarColumns - 1, y, high >= BarColumns ? '▶' : '▏', Slate.Faint);
    }

    private static int Columns(double share) => double.IsNaN(share) ? 0 : (int)Math.Min(BarColumns, Math.Ceiling(share * (BarColumns - 1)));

    private static void Number(CellGrid grid, Region region, int y, int column, string text, Colour ink, CellStyle style = CellStyle.Plain) =>
        grid.Write(region.X + NameColumns + ((column + 1) * NumberColumns) - text.Length, y, NumberColumns, text, ink, style);
}
