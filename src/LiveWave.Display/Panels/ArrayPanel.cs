using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>The array as it stands now: hue is phase, fill is how near the electrode is to its peak, so the crest is the full, bright ridge.</summary>
/// <remarks>Fill is a(1 + cos φ)/2 with the amplitude a against the last half minute's largest: an array at rest is dark, and a wave is
/// seen without colours too. Glyphs tell what is not observed: <c>~</c> bridged, <c>?</c> invalid, <c>×</c> not used.</remarks>
internal sealed class ArrayPanel
{
    private const string Fill = " ░▒▓█";
    private const double GroundShare = 0.3;
    private const double LeastInkShare = 0.5;
    private const double CrestCosine = 0.9;
    private const double CrestAmplitude = 0.35;
    private const double CrestGlow = 0.45;
    private const int AmplitudeSteps = 8;   // fewer looks, fewer bytes on a slow line
    private const int WheelCells = 8;

    private readonly bool _hasShades;
    private ArrayMap? _map;
    private (int Columns, int Rows) _size;

    /// <param name="depth">The colours it will be shown in: among 256 a dimmed hue is another hue or a grey, so there the fill alone tells.</param>
    public ArrayPanel(ColourDepth depth) => _hasShades = depth == ColourDepth.Full;

    public void Draw(CellGrid grid, Region region, SessionPicture picture)
    {
        Header(grid, region, picture.Facts);
        var room = region.Band(1, region.Rows - 1);
        if (_map is null || _size != (room.Columns, room.Rows))
        {
            _size = (room.Columns, room.Rows);
            _map = new ArrayMap(picture.Facts.Patch.Layout, room.Columns, room.Rows);
        }

        var (left, top) = (room.X + ((room.Columns - _map.Columns) / 2), room.Y + ((room.Rows - _map.Rows) / 2));
        for (var y = 0; y < _map.Rows; y++)
        {
            for (var x = 0; x < _map.Columns; x++)
            {
                if (_map.At(x, y) is { Count: > 0 } electrodes) grid.Put(left + x, top + y, CellOf(electrodes, picture));
            }
        }
    }

    private void Header(CellGrid grid, Region region, ViewFacts facts)
    {
        const string Left = "−180";
        const string Right = "180";
        var wheel = Left.Length + WheelCells + Right.Length;
        var x = grid.Write(region.X, region.Y, 6, "ARRAY ", Slate.Strong, CellStyle.Bold);
        grid.Write(x, region.Y, region.Columns - 6 - wheel - 1, $"{facts.Patch.Name} · {facts.Band.Name}", Slate.Text);
        x = grid.Write(region.X + region.Columns - wheel, region.Y, Left.Length, Left, Slate.Faint);
        for (var i = 0; i < WheelCells; i++)
        {
            var phase = ((i + 0.5) / WheelCells * 2 * Math.PI) - Math.PI;
            grid.Put(x + i, region.Y, Look(Math.Cos(phase), Math.Sin(phase), amplitude: 1));
        }

        grid.Write(x + WheelCells, region.Y, Right.Length, Right, Slate.Faint);
    }

    private Cell CellOf(IReadOnlyList<int> electrodes, SessionPicture picture)
    {
        var (re, im, count, validity) = (0.0, 0.0, 0, Validity.Invalid);
        var isUsed = false;
        foreach (var channel in electrodes)
        {
            if (!picture.Facts.Patch.Layout.Electrodes[channel].IsGood) continue;
            isUsed = true;
            var valid = picture.Phases.Validity[channel];
            if (valid > validity) validity = valid;
            if (valid == Validity.Invalid) continue;
            re += picture.Phases.Re[channel];
            im += picture.Phases.Im[channel];
            count++;
        }

        if (!isUsed) return new Cell('×', Slate.Faint, Slate.Ground);
        if (!picture.HasPhases || count == 0 || !(picture.FullAmplitude > 0)) return new Cell('?', Slate.Faint, Slate.Ground);
        var length = Math.Sqrt((re * re) + (im * im));
        var amplitude = Math.Clamp(Math.Round(AmplitudeSteps * length / count / picture.FullAmplitude) / AmplitudeSteps, 0, 1);
        var cell = length > 0 ? Look(re / length, im / length, amplitude) : new Cell(' ', Slate.Text, Slate.Ground);
        return validity == Validity.Observed ? cell : cell with { Glyph = '~' };
    }

    private Cell Look(double cosine, double sine, double amplitude)
    {
        var hue = CyclicMap.AtRadians(Math.Atan2(sine, cosine));
        var fill = 0.5 * (1 + cosine) * amplitude;
        var glyph = Fill[Math.Min((int)(fill * Fill.Length), Fill.Length - 1)];
        var ink = !_hasShades ? hue : Colour.Mix(Slate.Ground, hue, LeastInkShare + ((1 - LeastInkShare) * amplitude));
        if (cosine > CrestCosine && amplitude > CrestAmplitude) ink = Colour.Mix(ink, Slate.Strong, CrestGlow);
        return new Cell(glyph, ink, _hasShades ? Colour.Mix(Slate.Ground, hue, GroundShare * amplitude) : Slate.Ground);
    }
}
