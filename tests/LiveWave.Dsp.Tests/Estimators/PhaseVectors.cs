using System.Globalization;

namespace LiveWave.Dsp.Tests;

/// <summary>The input of a golden case and the outputs expected at every tenth of its rows.</summary>
/// <remarks>Made by <c>tools/golden/phase_vectors.py</c> (numpy 1.24.2, SciPy 1.10.1) from the reference of the phase study.</remarks>
internal sealed class PhaseVectors
{
    private const int Every = 10;

    // The files carry nine digits; an exact recursion in double reproduces them to 5e-9 to 8e-9 of a column's RMS.
    private const double Tolerance = 1e-7;

    private readonly Dictionary<string, double[]> _expected;

    internal PhaseVectors(string name)
    {
        var input = Columns($"phase-{name}-input.csv");
        _expected = Columns($"phase-{name}-expected.csv");
        Samples = input["x"];
        WithGaps = [.. Samples.Select((x, row) => input["valid"][row] > 0 ? x : double.NaN)];
    }

    /// <summary>Every sample.</summary>
    internal double[] Samples { get; }

    /// <summary>The same with three gaps: NaN in 5, 5 and 40 rows.</summary>
    internal double[] WithGaps { get; }

    internal void AssertMatches(string column, IReadOnlyList<double> actual)
    {
        var expected = _expected[column];
        var tolerance = Tolerance * Math.Sqrt(expected.Average(value => value * value));
        for (var i = 0; i < expected.Length; i++)
        {
            Assert.True(
                Math.Abs(actual[Every * i] - expected[i]) <= tolerance,
                $"{column}, row {Every * i}: {actual[Every * i]:R} instead of {expected[i]:R}, tolerance {tolerance:R}");
        }
    }

    private static Dictionary<string, double[]> Columns(string file)
    {
        var lines = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "Golden", file));
        var rows = lines.Skip(1).Select(line => line.Split(',')).ToArray();
        return lines[0].Split(',').Select((name, at) => (name, at)).ToDictionary(
            column => column.name,
            column => rows.Select(row => double.Parse(row[column.at], CultureInfo.InvariantCulture)).ToArray());
    }
}
