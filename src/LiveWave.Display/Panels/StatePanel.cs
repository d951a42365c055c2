using LiveWave.Pipeline;

namespace LiveWave.Display;

/// <summary>The top line: what the gate lets through, in words; stream, losses, calibration, pulses used.</summary>
/// <remarks>Armed is not a hue: the line turns from light-on-dark to dark-on-light with a hatched edge, so it is seen without
/// colours and by any eye.</remarks>
internal static class StatePanel
{
    private const int WideColumns = 110;
    private const int LeastStreamColumns = 8;

    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        var isArmed = picture.Gate.State == GateState.Armed;
        var style = CellStyle.Bold | (isArmed ? CellStyle.Reversed : CellStyle.Plain);
        for (var x = 0; x < region.Columns; x++) grid.Put(region.X + x, region.Y, ' ', Slate.Strong, style);
        var edge = isArmed ? 2 : 0;
        for (var x = 0; x < edge; x++)
        {
            grid.Put(region.X + x, region.Y, '▞', Slate.Strong, style);
            grid.Put(region.X + region.Columns - 1 - x, region.Y, '▞', Slate.Strong, style);
        }

        var room = region.Columns - (2 * edge) - 1;
        var word = Word(picture.Gate);
        var rest = Rest(picture, room >= WideColumns);
        var streamRoom = Math.Max(LeastStreamColumns, room - word.Length - rest.Length - 2);
        var format = picture.Facts.Stream;
        var counts = $" {format.ChannelCount} ch {format.NominalRateHz:0.##} Hz";
        var x0 = grid.Write(region.X + edge, region.Y, room, $" {word}", Slate.Strong, style);
        var plain = isArmed ? CellStyle.Reversed : CellStyle.Plain;
        x0 = grid.Write(x0 + 2, region.Y, streamRoom - counts.Length, format.Name, Slate.Strong, plain);
        x0 = grid.Write(x0, region.Y, counts.Length, counts, Slate.Strong, plain);
        grid.Write(x0, region.Y, region.X + region.Columns - edge - x0, rest, Slate.Strong, plain);
    }

    internal static string Word(in GateGlance gate) => gate.State switch
    {
        GateState.Armed => "ARMED",
        GateState.Rehearsing => "REHEARSAL",
        _ => gate.Reason.Length == 0 ? "DISARMED" : $"DISARMED ({gate.Reason})",
    };

    private static string Rest(SessionPicture picture, bool isWide)
    {
        var run = picture.Run;
        var lost = isWide ? $"lost {Words.Count(run.LostRows, "row")} in {Words.Count(run.Gaps, "gap")}" : $"lost {Words.Count(run.LostRows, "row")}";
        var used = picture.Facts.PulsesAllowed is { } allowed ? $"{picture.Gate.PulsesUsed} of {allowed}" : $"{picture.Gate.PulsesUsed}";
        return $"  {lost}  {picture.Facts.CalibrationWord}  {(isWide ? "pulses used" : "used")} {used}";
    }
}
