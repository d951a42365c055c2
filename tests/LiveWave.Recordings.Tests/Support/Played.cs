using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

/// <summary>Everything a feed delivered, read to its end with blocks of one size.</summary>
internal sealed class Played
{
    public List<double[]> Rows { get; } = [];

    public List<double> Stamps { get; } = [];

    public List<ClockMeasurement> Clock { get; } = [];

    public List<byte> Wire { get; } = [];

    public List<int> BlockRows { get; } = [];

    public List<long> Restarts { get; } = [];

    public IReadOnlyList<Status> Warnings { get; private set; } = [];

    public string Warned => string.Join("\n", Warnings.Select(warning => $"{warning.Where}: {warning.What}; {warning.Advice}"));

    public static Played File(string path, int blockRows = 32, string? stream = null)
    {
        using var feed = RecordingFile.Open(path).OpenFeed(stream);
        return Feed(feed, blockRows);
    }

    public static Played Feed(RecordingFeed feed, int blockRows)
    {
        var played = new Played();
        var block = new SampleBlock(feed.Format, blockRows);
        while (feed.Pull(block, TimeSpan.Zero) == PullResult.Samples) played.Take(block);
        Assert.Equal(0, block.Count);
        Assert.Equal(PullResult.Ended, feed.Pull(block, TimeSpan.Zero));
        played.Warnings = feed.Warnings;
        return played;
    }

    private void Take(SampleBlock block)
    {
        Assert.Equal(Rows.Count, block.FirstReceived);
        if (block.AfterRestart) Restarts.Add(block.FirstReceived);
        BlockRows.Add(block.Count);
        for (var i = 0; i < block.Count; i++)
        {
            Rows.Add(block.Row(i).ToArray());
            Stamps.Add(block.RawStampSeconds(i));
        }

        foreach (var measurement in block.ClockMeasurements)
        {
            Assert.InRange(measurement.FromReceived, block.FirstReceived, block.FirstReceived + block.Count - 1);
            Clock.Add(measurement);
        }

        Wire.AddRange(block.Wire);
    }
}
