using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>Below the array: where it goes, how sure, what it is, how fast. Bright while an event passes.</summary>
internal static class DirectionPanel
{
    public static void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        var reading = picture.Newest;
        var isPassing = picture.IsPassing;
        var ink = isPassing ? Slate.Strong : Slate.Faint;
        var style = isPassing ? CellStyle.Bold : CellStyle.Plain;
        var x = region.X;
        if (double.IsNaN(reading.DirectionDegrees) || !WaveKinds.Travels(reading.Kind))
        {
            grid.Write(x, region.Y, region.Columns, $"{Words.Arrow(double.NaN)} {(reading.IsValid ? WaveKinds.Word(reading.Kind) : "no valid frame")}", ink);
            return;
        }

        var hue = isPassing ? CyclicMap.AtDegrees(reading.DirectionDegrees) : ink;
        grid.Put(x, region.Y, Words.Arrow(reading.DirectionDegrees), hue, style);
        x = grid.Write(x + 2, region.Y, region.Columns - 2, Direction(reading), ink, style);
        var kind = isPassing ? WaveKinds.Word(reading.Kind) : $"({WaveKinds.Word(reading.Kind)})";
        var more = region.Rows > 1 ? $"  {kind}{(isPassing ? " wave passes" : "")}" : $"  {kind}  {Speed(reading)}";
        grid.Write(x, region.Y, region.X + region.Columns - x, more, ink);
        if (region.Rows < 2) return;
        grid.Write(region.X + 2, region.Y + 1, region.Columns - 2, $"{Speed(reading)}  {reading.WavelengthMm:0.0} mm  {reading.LocalFrequencyHz:0.0} Hz", ink);
    }

    private static string Direction(in Reading reading)
    {
        var error = reading.DirectionStandardErrorDegrees;
        return double.IsNaN(error) ? Words.Degrees(reading.DirectionDegrees) : $"{Words.Degrees(reading.DirectionDegrees)} ± {error:0.0}°";
    }

    private static string Speed(in Reading reading) => reading.SlownessMiddle > 0 ? $"{1 / reading.SlownessMiddle:0.000} m/s" : "speed n/a";
}
