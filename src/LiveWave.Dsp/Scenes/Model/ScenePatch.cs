using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>One array of a scene; its channels follow those of the patch before.</summary>
/// <param name="Name">How it is called.</param>
/// <param name="Layout">Its electrodes, each with its channel's label. Their rotation is not used.</param>
public sealed record ScenePatch(string Name, Layout Layout)
{
    /// <summary>Electrodes in rows and columns, labelled <c>r1c1</c>: rows counted from 1 at the bottom, columns from 1 at the left.</summary>
    /// <param name="name">The patch's name.</param>
    /// <param name="rows">At least 1.</param>
    /// <param name="columns">At least 1.</param>
    /// <param name="pitchMm">From electrode to electrode, above 0.</param>
    /// <param name="withoutCorners">The four corners carry no electrode.</param>
    /// <param name="labelPrefix">In front of every label.</param>
    public static ScenePatch Grid(
        string name, int rows, int columns, double pitchMm, bool withoutCorners = false, string labelPrefix = "")
    {
        var electrodes = new List<Electrode>(rows * columns);
        for (var row = 1; row <= rows; row++)
        {
            for (var column = 1; column <= columns; column++)
            {
                var isCorner = (row == 1 || row == rows) && (column == 1 || column == columns);
                if (withoutCorners && isCorner) continue;
                electrodes.Add(new($"{labelPrefix}r{row}c{column}", (column - 1) * pitchMm, (row - 1) * pitchMm));
            }
        }

        return new ScenePatch(name, new Layout(electrodes));
    }
}
