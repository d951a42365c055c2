using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>The tide of evidence: ten seconds that flow to the left, events below as bars tinted by direction, verdicts as ticks.</summary>
/// <remarks>The lowest row of the evidence lies below the threshold, the rows above it beyond: a bar that reaches the second row is
/// over. Beyond the threshold the scale is logarithmic.</remarks>
internal static class TidePanel
{
    /// <summary>Rows beside those of evidence: header, events, verdicts.</summary>
    public const int OtherRows = 3;

    private const int LabelColumns = 10;
    private const string Blocks = "▁▂▃▄▅▆▇█";
    private const double BelowSpan = 10;
    private const double Knee = 5;
    private const double FullExcess = 200;

    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        var evidenceRows = region.Rows - OtherRows;
        Header(grid, region, picture);
        var plot = new Region(region.X + LabelColumns, region.Y + 1, region.Columns - LabelColumns, evidenceRows);
        Labels(grid, region, evidenceRows, picture.Facts);
        Evidence(grid, plot, picture);
        Events(grid, plot with { Y = plot.Y + evidenceRows, Rows = 1 }, picture);
        Verdicts(grid, plot with { Y = plot.Y + evidenceRows + 1, Rows = 1 }, picture);
    }

    /// <summary>How high evidence stands, in rows from the bottom; 1 is the threshold.</summary>
    internal static double Height(double excess, int rows)
    {
        if (double.IsNegativeInfinity(excess) || double.IsNaN(excess)) return 0;
        if (excess < 0) return Math.Max(0, 1 + (excess / BelowSpan));
        return 1 + ((rows - 1) * Math.Min(1, Math.Log(1 + (excess / Knee)) / Math.Log(1 + (FullExcess / Knee))));
    }

    private static void Header(CellGrid grid, Region region, SessionPicture picture)
    {
        var x = grid.Write(region.X, region.Y, region.Columns, "TIDE ", Slate.Strong, CellStyle.Bold);
        x = grid.Write(x, region.Y, region.Columns, "last 10 s", Slate.Text);
        grid.Write(x + 3, region.Y, region.X + region.Columns - x - 3, "▲ pulse  △ sham  × hold  ! not as planned", Slate.Faint);
        var now = double.IsNaN(picture.NewestSeconds) ? "no row yet" : $"{picture.NewestSeconds - picture.FirstSeconds:0.0} s";
        grid.Write(region.X + region.Columns - now.Length, region.Y, now.Length, now, Slate.Strong);
    }

    private static void Labels(CellGrid grid, Region region, int evidenceRows, ViewFacts facts)
    {
        var (lowest, highest) = (facts.EnterBySector.Min(), facts.EnterBySector.Max());
        var threshold = lowest.Equals(highest) ? $"{lowest:0.#}" : $"{lowest:0}…{highest:0}";
        grid.Write(region.X, region.Y + 1, LabelColumns - 1, "evidence", Slate.Faint);
        grid.Write(region.X, region.Y + evidenceRows, LabelColumns - 1, $"from {threshold}".Replace('-', '−'), Slate.Faint);
        grid.Write(region.X, region.Y + evidenceRows + 1, LabelColumns - 1, "waves", Slate.Faint);
        grid.Write(region.X, region.Y + evidenceRows + 2, LabelColumns - 1, "verdicts", Slate.Faint);
    }

    private static void Evidence(CellGrid grid, Region plot, SessionPicture picture)
    {
        Span<double> highest = stackalloc double[plot.Columns];
        highest.Fill(double.NegativeInfinity);
        for (var back = 0; back < picture.Evidence.Count; back++)
        {
            var column = Column(picture.Evidence[back].StampSeconds, picture, plot.Columns);
            if (column < 0) break;
            if (column < plot.Columns) highest[column] = Math.Max(highest[column], picture.Evidence[back].Excess);
        }

        for (var x = 0; x < plot.Columns; x++)
        {
            var height = Height(highest[x], plot.Rows);
            for (var row = 0; row < plot.Rows; row++)
            {
                var eighths = (int)Math.Round(8 * Math.Clamp(height - row, 0, 1));
                var y = plot.Y + plot.Rows - 1 - row;
                if (eighths > 0) grid.Put(plot.X + x, y, Blocks[eighths - 1], height > 1 ? Slate.Text : Slate.Faint);
                else if (row == 1) grid.Put(plot.X + x, y, '▁', Slate.Faint);   // the threshold: the floor of the second row
            }
        }
    }

    private static void Events(CellGrid grid, Region row, SessionPicture picture)
    {
        for (var back = picture.Events.Count - 1; back >= 0; back--)
        {
            ref readonly var wave = ref picture.Events[back];
            var end = wave.State == WaveEventState.Passing ? picture.NewestSeconds : wave.Last.StampSeconds;
            var (from, to) = (Column(wave.Onset.StampSeconds, picture, row.Columns), Column(end, picture, row.Columns));
            var hue = CyclicMap.AtDegrees(wave.DirectionDegrees);
            for (var x = Math.Max(from, 0); x <= Math.Min(to, row.Columns - 1); x++) grid.Put(row.X + x, row.Y, '▆', hue);
            if (from >= 0 && from < row.Columns) grid.Put(row.X + from, row.Y, Words.Arrow(wave.DirectionDegrees), hue, CellStyle.Bold);
        }
    }

    private static void Verdicts(CellGrid grid, Region row, SessionPicture picture)
    {
        for (var back = picture.Verdicts.Count - 1; back >= 0; back--)
        {
            ref readonly var verdict = ref picture.Verdicts[back];
            var column = Column(verdict.Decision.At.StampSeconds, picture, row.Columns);
            if (column < 0 || column >= row.Columns) continue;
            var isHold = verdict.Decision.Kind == DecisionKind.Hold;
            grid.Put(row.X + column, row.Y, Tick(verdict), isHold ? Slate.Faint : Slate.Strong, isHold ? CellStyle.Plain : CellStyle.Bold);
        }
    }

    private static char Tick(in Verdict verdict) => verdict.Decision.Kind switch
    {
        _ when !Words.IsAsPlanned(verdict.Outcome.Kind) => '!',
        DecisionKind.Pulse => '▲',
        DecisionKind.Sham => '△',
        _ => '×',
    };

    /// <summary>Columns are steps of stream time that stay where they are while they flow, so that nothing flickers.</summary>
    private static int Column(double stampSeconds, SessionPicture picture, int columns)
    {
        if (double.IsNaN(picture.NewestSeconds)) return -1;
        var columnSeconds = SessionPicture.TideSeconds / columns;
        var back = Math.Floor(picture.NewestSeconds / columnSeconds) - Math.Floor(stampSeconds / columnSeconds);
        return back > columns ? -1 : columns - 1 - (int)back;
    }
}
