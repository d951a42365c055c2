using LiveWave.Abstractions;

namespace LiveWave.Display;

/// <summary>Where the electrodes of a patch lie on a screen of cells, each twice as high as wide.</summary>
/// <remarks>Seen as the layout states, after its rotation, +x to the right and +y up. Where there is room an electrode covers
/// several cells, where there is none a cell stands for several electrodes.</remarks>
internal sealed class ArrayMap
{
    private const double CellAspect = 2;
    private const double Rounding = 1e-6;   // positions are sums of decimals
    private readonly List<int>[] _electrodes;

    /// <summary>Places electrodes.</summary>
    /// <param name="layout">Where they are.</param>
    /// <param name="columns">Cells across, at most.</param>
    /// <param name="rows">Cells down, at most.</param>
    public ArrayMap(Layout layout, int columns, int rows)
    {
        var (x, y) = Turned(layout);
        var pitch = Pitch(x, y);
        var (across, down) = ((x.Max() - x.Min()) / pitch, (y.Max() - y.Min()) / pitch);
        var rowsPerPitch = Whole(Math.Min(rows / (down + 1), columns / (CellAspect * (across + 1))));
        var columnsPerPitch = CellAspect * rowsPerPitch;
        Columns = Math.Clamp((int)Math.Ceiling((across + 1) * columnsPerPitch - Rounding), 1, columns);
        Rows = Math.Clamp((int)Math.Ceiling((down + 1) * rowsPerPitch - Rounding), 1, rows);
        _electrodes = new List<int>[Columns * Rows];
        for (var i = 0; i < _electrodes.Length; i++) _electrodes[i] = [];
        for (var i = 0; i < x.Length; i++)
        {
            Place(i, (x[i] - x.Min()) / pitch * columnsPerPitch, (y.Max() - y[i]) / pitch * rowsPerPitch, columnsPerPitch, rowsPerPitch);
        }
    }

    /// <summary>Cells across.</summary>
    public int Columns { get; }

    /// <summary>Cells down.</summary>
    public int Rows { get; }

    /// <summary>The electrodes of a cell, by channel of the patch; empty where there is none.</summary>
    /// <param name="column">From the left.</param>
    /// <param name="row">From the top.</param>
    public IReadOnlyList<int> At(int column, int row) => _electrodes[(row * Columns) + column];

    private void Place(int electrode, double left, double top, double width, double height)
    {
        var (x0, y0) = ((int)Math.Round(left), (int)Math.Round(top));
        var (x1, y1) = (Math.Max(x0 + 1, (int)Math.Round(left + width)), Math.Max(y0 + 1, (int)Math.Round(top + height)));
        for (var y = y0; y < y1; y++)
        {
            for (var x = x0; x < x1; x++) _electrodes[(Math.Min(y, Rows - 1) * Columns) + Math.Min(x, Columns - 1)].Add(electrode);
        }
    }

    // Whole cells per electrode look alike all over the array; below one cell there is nothing to round.
    private static double Whole(double rowsPerPitch) => rowsPerPitch >= 1 - Rounding ? Math.Floor(rowsPerPitch + Rounding) : rowsPerPitch;

    private static (double[] X, double[] Y) Turned(Layout layout)
    {
        var (cosine, sine) = (Math.Cos(layout.RotationDegrees * Math.PI / 180), Math.Sin(layout.RotationDegrees * Math.PI / 180));
        return (
            [.. layout.Electrodes.Select(electrode => (electrode.XMm * cosine) - (electrode.YMm * sine))],
            [.. layout.Electrodes.Select(electrode => (electrode.XMm * sine) + (electrode.YMm * cosine))]);
    }

    /// <summary>The smallest distance between two electrodes; 1 where there are no two.</summary>
    private static double Pitch(double[] x, double[] y)
    {
        var least = double.PositiveInfinity;
        for (var i = 0; i < x.Length; i++)
        {
            for (var j = i + 1; j < x.Length; j++)
            {
                var squared = ((x[i] - x[j]) * (x[i] - x[j])) + ((y[i] - y[j]) * (y[i] - y[j]));
                if (squared > 0) least = Math.Min(least, squared);
            }
        }

        return double.IsFinite(least) ? Math.Sqrt(least) : 1;
    }
}
