using LiveWave.Abstractions;
using LiveWave.Dsp;

namespace LiveWave.Testing;

/// <summary>Signals for tests, the same bits everywhere. A signal is an array of rows, one value a channel, in microvolts.</summary>
public static class Signals
{
    /// <summary>A stream with channels named e1, e2, … in microvolts.</summary>
    /// <param name="rateHz">Samples per second.</param>
    /// <param name="channelCount">At least 1.</param>
    public static StreamFormat Format(double rateHz, int channelCount) =>
        new("test", rateHz, WireFormat.Float64, [.. Enumerable.Range(1, channelCount).Select(i => new ChannelFormat($"e{i}", "microvolts"))]);

    /// <summary>White noise, mean 0, standard deviation 1, independent between channels.</summary>
    /// <param name="seed">Any number.</param>
    /// <param name="rowCount">Rows.</param>
    /// <param name="channelCount">Values a row.</param>
    public static double[][] Noise(ulong seed, int rowCount, int channelCount)
    {
        var normals = new SplitMix64(seed);
        return Rows(rowCount, channelCount, (_, _) => normals.NextNormal());
    }

    /// <summary>A cosine of amplitude 1; channel c lags by c times <paramref name="lagRadians"/>.</summary>
    /// <param name="frequencyHz">Frequency.</param>
    /// <param name="rateHz">Samples per second.</param>
    /// <param name="rowCount">Rows.</param>
    /// <param name="channelCount">Values a row.</param>
    /// <param name="lagRadians">Lag from one channel to the next.</param>
    public static double[][] Cosine(double frequencyHz, double rateHz, int rowCount, int channelCount, double lagRadians = 0) =>
        Rows(rowCount, channelCount, (row, channel) => Portable.Cos((2 * Math.PI * frequencyHz * row / rateHz) - (channel * lagRadians)));

    /// <summary>What a recording may look like: a rhythm of 10 Hz that travels, mains of 50 Hz, an offset a channel, white noise.</summary>
    /// <param name="seed">Any number.</param>
    /// <param name="rateHz">Samples per second.</param>
    /// <param name="rowCount">Rows.</param>
    /// <param name="channelCount">Values a row.</param>
    public static double[][] Recording(ulong seed, double rateHz, int rowCount, int channelCount)
    {
        var normals = new SplitMix64(seed);
        return Rows(rowCount, channelCount, (row, channel) =>
            (20 * Portable.Cos((2 * Math.PI * 10 * row / rateHz) - (0.3 * channel)))
            + (15 * Portable.Sin(2 * Math.PI * 50 * row / rateHz))
            + (100 * (channel - 1.5))
            + (5 * normals.NextNormal()));
    }

    /// <summary>Rows by a formula, row by row, channel by channel.</summary>
    /// <param name="rowCount">Rows.</param>
    /// <param name="channelCount">Values a row.</param>
    /// <param name="value">Value at (row, channel).</param>
    public static double[][] Rows(int rowCount, int channelCount, Func<int, int, double> value)
    {
        var rows = new double[rowCount][];
        for (var row = 0; row < rowCount; row++)
        {
            rows[row] = new double[channelCount];
            for (var channel = 0; channel < channelCount; channel++) rows[row][channel] = value(row, channel);
        }

        return rows;
    }
}
