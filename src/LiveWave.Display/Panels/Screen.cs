namespace LiveWave.Display;

/// <summary>Puts the panels on a screen of a given size: what a session looks like at one instant.</summary>
/// <remarks>Left the array, below it the tide over the whole width; right, from the top, rose, verdicts, budget, losses.</remarks>
internal sealed class Screen
{
    /// <summary>Below this there is one line that says so.</summary>
    public const int LeastColumns = 80;

    /// <summary>Below this there is one line that says so.</summary>
    public const int LeastRows = 24;

    private const int StateRows = 1;
    private const int RosierRows = 30;
    private const int TallRows = 36;
    private const int MostRoseRows = 13;
    private const int Gutter = 2;
    private readonly ArrayPanel _array;

    /// <summary>Makes a screen.</summary>
    /// <param name="depth">The colours it will be shown in.</param>
    public Screen(ColourDepth depth) => _array = new ArrayPanel(depth);

    /// <summary>Draws everything.</summary>
    /// <param name="grid">Cleared, then drawn on.</param>
    /// <param name="picture">What is known.</param>
    public void Draw(CellGrid grid, SessionPicture picture)
    {
        grid.Clear();
        if (grid.Columns < LeastColumns || grid.Rows < LeastRows)
        {
            grid.Write(0, 0, grid.Columns, $"needs more room: {LeastColumns} × {LeastRows} characters, has {grid.Columns} × {grid.Rows}", Slate.Strong, CellStyle.Bold);
            return;
        }

        var tideRows = TidePanel.OtherRows + (grid.Rows < RosierRows ? 2 : grid.Rows < TallRows ? 3 : 5);
        var bodyRows = grid.Rows - StateRows - tideRows;
        var leftColumns = Math.Max(34, (grid.Columns * 5) / 12);
        StatePanel.Draw(grid, new Region(0, 0, grid.Columns, StateRows), picture);
        Left(grid, new Region(1, StateRows, leftColumns, bodyRows), picture);
        Right(grid, new Region(1 + leftColumns + Gutter, StateRows, grid.Columns - leftColumns - Gutter - 2, bodyRows), picture);
        TidePanel.Draw(grid, new Region(1, StateRows + bodyRows, grid.Columns - 2, tideRows), picture);
    }

    private void Left(CellGrid grid, Region left, SessionPicture picture)
    {
        var words = left.Rows < 20 ? 1 : 2;
        _array.Draw(grid, left.Band(0, left.Rows - words), picture);
        DirectionPanel.Draw(grid, left.Band(left.Rows - words, words), picture);
    }

    private static void Right(CellGrid grid, Region right, SessionPicture picture)
    {
        var isTight = right.Rows < 20;
        var budget = isTight ? 6 : 8;
        var losses = isTight ? 0 : 1;
        var rose = Math.Min(MostRoseRows, (right.Rows - budget - losses) * 2 / 3);
        var verdicts = right.Rows - budget - losses - rose;
        RosePanel.Draw(grid, right.Band(0, rose), picture);
        VerdictPanel.Draw(grid, right.Band(rose, verdicts), picture);
        BudgetPanel.Draw(grid, right.Band(rose + verdicts, budget), picture);
        if (losses > 0) LossPanel.Draw(grid, right.Band(right.Rows - 1, 1), picture);
    }
}
