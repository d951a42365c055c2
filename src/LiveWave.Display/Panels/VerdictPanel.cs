using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>The last verdicts, newest first, each with its reason; and what people should know.</summary>
internal static class VerdictPanel
{
    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        grid.Write(region.X, region.Y, region.Columns, "VERDICTS", Slate.Strong, CellStyle.Bold);
        var rows = region.Rows - 1;
        if (picture.Notice is { } notice)
        {
            var advice = notice.Advice.Length == 0 ? "" : $"; {notice.Advice}";
            var style = notice.Level == StatusLevel.Fault ? CellStyle.Bold | CellStyle.Reversed : CellStyle.Bold;
            grid.Write(region.X, region.Y + rows, region.Columns, $"! {notice.Where}: {notice.What}{advice}", Slate.Strong, style);
            rows--;
        }

        for (var back = 0; back < Math.Min(rows, picture.Verdicts.Count); back++)
        {
            Line(grid, region, region.Y + 1 + back, picture, picture.Verdicts[back]);
        }

        if (picture.Verdicts.Count == 0) grid.Write(region.X, region.Y + 1, region.Columns, "none yet", Slate.Faint);
    }

    private static void Line(CellGrid grid, Region region, int y, SessionPicture picture, in Verdict verdict)
    {
        var decision = verdict.Decision;
        var isHold = decision.Kind == DecisionKind.Hold;
        var isAsPlanned = Words.IsAsPlanned(verdict.Outcome.Kind);
        var ink = isHold ? Slate.Faint : Slate.Strong;
        var style = isAsPlanned ? CellStyle.Plain : CellStyle.Bold;
        var x = grid.Write(region.X, y, region.Columns, $"{decision.At.StampSeconds - picture.FirstSeconds,7:0.00} s ", ink, style);
        grid.Put(x, y, Words.Arrow(decision.DirectionDegrees), CyclicMap.AtDegrees(decision.DirectionDegrees), CellStyle.Bold);
        var mark = isAsPlanned ? "" : "! ";
        var text = $"{Words.Degrees(decision.DirectionDegrees),4} {mark}{Words.Of(verdict, picture.Facts.Rules)}";
        grid.Write(x + 2, y, region.X + region.Columns - x - 2, text, ink, style);
    }
}
