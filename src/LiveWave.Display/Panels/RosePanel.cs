using LiveWave.Abstractions;
using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>The rose: directions of the last minute's waves, each petal in the colour of its direction, the rule's sector on the rim.</summary>
internal static class RosePanel
{
    private const int Petals = 16;
    private const sbyte None = -1;
    private const double PetalDegrees = 360.0 / Petals;

    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        var x = grid.Write(region.X, region.Y, region.Columns, "ROSE ", Slate.Strong, CellStyle.Bold);
        grid.Write(x, region.Y, region.Columns - 5, "directions of the last minute", Slate.Text);
        var rows = region.Rows - 1;
        var dots = new DotCanvas(2 * rows, rows);
        Span<int> counts = stackalloc int[Petals];
        var (waves, wanted) = Count(picture, counts);
        Span<sbyte> petals = stackalloc sbyte[dots.Columns * dots.Rows];
        petals.Fill(None);
        Fill(dots, counts, petals, picture.Facts);
        for (var row = 0; row < rows; row++)
        {
            for (var column = 0; column < dots.Columns; column++)
            {
                var glyph = dots.Glyph(column, row);
                var petal = petals[(row * dots.Columns) + column];
                var ink = petal == None ? Slate.Text : CyclicMap.AtDegrees(petal * PetalDegrees);
                if (glyph != ' ') grid.Put(region.X + column, region.Y + 1 + row, glyph, ink);
            }
        }

        Needle(grid, region, dots, picture);
        Notes(grid, new Region(region.X + dots.Columns + 2, region.Y + 1, region.Columns - dots.Columns - 2, rows), picture, waves, wanted);
    }

    private static (int Waves, int Wanted) Count(SessionPicture picture, Span<int> counts)
    {
        var (waves, wanted) = (0, 0);
        for (var back = 0; back < picture.Events.Count; back++)
        {
            ref readonly var wave = ref picture.Events[back];
            if (wave.Passed.StampSeconds < picture.NewestSeconds - SessionPicture.RoseSeconds) break;
            if (double.IsNaN(wave.DirectionDegrees)) continue;
            counts[PetalOf(wave.DirectionDegrees)]++;
            waves++;
            if (picture.Facts.IsWanted(wave.DirectionDegrees)) wanted++;
        }

        return (waves, wanted);
    }

    /// <summary>Sets the dots, and notes for each cell which petal is in it, if one is.</summary>
    private static void Fill(DotCanvas dots, ReadOnlySpan<int> counts, Span<sbyte> petals, ViewFacts facts)
    {
        var most = 1;
        foreach (var count in counts) most = Math.Max(most, count);
        for (var y = 0; y < dots.Height; y++)
        {
            for (var x = 0; x < dots.Width; x++)
            {
                var (radius, degrees) = Polar(dots, x, y);
                var isRim = radius is > 0.94 and <= 1.0;
                var isFarRim = radius > 0.9 && radius <= 1.0;

                // Areas, not lengths, are what an eye compares: the radius is the root of the count.
                var petal = PetalOf(degrees);
                var isPetal = radius <= 0.86 * Math.Sqrt(counts[petal] / (double)most);
                if (isPetal) petals[(y / 4 * dots.Columns) + (x / 2)] = (sbyte)petal;
                if (isPetal || (isFarRim && facts.Rules.Count > 0 && facts.IsWanted(degrees)) || (isRim && (x + y) % 3 == 0)) dots.Set(x, y);
            }
        }
    }

    /// <summary>Where the newest frame points while a wave passes: an arrow on the rim.</summary>
    private static void Needle(CellGrid grid, Region region, DotCanvas dots, SessionPicture picture)
    {
        var degrees = picture.Newest.DirectionDegrees;
        if (!picture.IsPassing || double.IsNaN(degrees)) return;
        var (cosine, sine) = (Math.Cos(degrees * Math.PI / 180), Math.Sin(degrees * Math.PI / 180));
        var column = (int)Math.Clamp(0.5 * dots.Columns * (1 + (0.9 * cosine)), 0, dots.Columns - 1);
        var row = (int)Math.Clamp(0.5 * dots.Rows * (1 - (0.9 * sine)), 0, dots.Rows - 1);
        grid.Put(region.X + column, region.Y + 1 + row, Words.Arrow(degrees), Slate.Strong, CellStyle.Bold);
    }

    private static void Notes(CellGrid grid, Region region, SessionPicture picture, int waves, int wanted)
    {
        var lines = new List<string> { $"{Words.Count(waves, "wave")}, {wanted} wanted" };
        foreach (var rule in picture.Facts.Rules)
        {
            lines.Add($"rule {rule.Name}");
            lines.Add(double.IsNaN(rule.DirectionDegrees)
                ? "  any direction"
                : $"  {Words.Arrow(rule.DirectionDegrees)} {Words.Degrees(rule.DirectionDegrees)} ± {rule.ToleranceDegrees:0}°, on the rim");
        }

        lines.Add($"{Count(picture, DecisionKind.Pulse)}, {Count(picture, DecisionKind.Sham)}, {Count(picture, DecisionKind.Hold)}");
        foreach (var axis in picture.Facts.Patch.Layout.Axes) lines.Add($"{Words.Arrow(axis.Degrees)} {axis.Name}");
        for (var i = 0; i < Math.Min(lines.Count, region.Rows); i++)
        {
            grid.Write(region.X, region.Y + i, region.Columns, lines[i], i == 0 ? Slate.Text : Slate.Faint);
        }
    }

    private static string Count(SessionPicture picture, DecisionKind kind) => Words.Count(picture.CountOf(kind), DecisionWords.What(kind));

    private static (double Radius, double Degrees) Polar(DotCanvas dots, double x, double y)
    {
        var (right, up) = (((x + 0.5) / dots.Width * 2) - 1, 1 - ((y + 0.5) / dots.Height * 2));
        return (Math.Sqrt((right * right) + (up * up)), Math.Atan2(up, right) * (180 / Math.PI));
    }

    private static int PetalOf(double degrees) => (int)Math.Round(degrees / PetalDegrees) & (Petals - 1);
}
