using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

public sealed class PhaseSnapshotTests
{
    private const int Channels = 60;
    private const int Many = 4096;   // long copies: a reader without its question would often be caught

    [Fact]
    public void A_reader_gets_the_newest_frame_and_its_number()
    {
        var snapshot = new PhaseSnapshot(Channels);
        var into = new Phasors(Channels);

        Assert.False(snapshot.TryRead(into, out _));
        snapshot.Write(Frame(1));
        snapshot.Write(Frame(2));

        Assert.True(snapshot.TryRead(into, out var number));
        Assert.Equal((2, 2, 2.0, -2.0), (number, into.At.Index, into.Re[Channels - 1], into.Im[0]));
        Assert.Equal(Validity.Bridged, into.Validity[3]);
    }

    [Fact]
    public void A_reader_beside_a_busy_writer_never_gets_half_of_a_frame()
    {
        var snapshot = new PhaseSnapshot(Many);
        var frames = Enumerable.Range(0, 64).Select(value => Frame(value, Many)).ToArray();
        var isOver = false;
        var writer = new Thread(() =>
        {
            for (var i = 0; i < 20_000; i++) snapshot.Write(frames[i % frames.Length]);
            Volatile.Write(ref isOver, true);
        });
        var into = new Phasors(Many);
        var last = 0L;

        writer.Start();
        while (!Volatile.Read(ref isOver))
        {
            if (!snapshot.TryRead(into, out var number)) continue;
            Assert.True(number >= last);
            last = number;
            Assert.Equal((number - 1) % frames.Length, into.At.Index);
            Assert.Equal(-1, into.Re.IndexOfAnyExcept(into.At.Index));
            Assert.Equal(-1, into.Im.IndexOfAnyExcept(-into.At.Index));
        }

        writer.Join();
    }

    [Fact]
    public void A_watched_run_writes_every_frame_and_reads_what_an_unwatched_one_does()
    {
        var setup = Rig.Setup();
        var rows = Rig.Rows(setup, seconds: 4);
        var snapshot = new PhaseSnapshot(20);
        var watched = new DecisionCore(setup, Fail, [snapshot]);
        var alone = new DecisionCore(setup, Fail);

        foreach (var core in (DecisionCore[])[watched, alone])
        {
            for (var i = 0; i < rows.Length; i++)
            {
                var now = new RowInstant(i, i, i / 500.0);
                if (!core.StepPhase(now, rows[i])) continue;
                core.Read(now);
                core.Decide(now);
            }
        }

        var into = new Phasors(20);
        Assert.True(snapshot.TryRead(into, out var number));
        Assert.Equal(watched.Readings.Count, number);
        Assert.Equal(watched.Readings[^1].At.Index, into.At.Index);
        Assert.Contains(into.Re.ToArray(), value => value != 0);
        Assert.Equal(alone.Readings, watched.Readings);
        Assert.Equal(alone.Decisions, watched.Decisions);
    }

    [Fact]
    public void Writing_allocates_nothing()
    {
        var snapshot = new PhaseSnapshot(Channels);
        var frame = Frame(1);
        snapshot.Write(frame);

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 100; i++) snapshot.Write(frame);
        var allocated = GC.GetAllocatedBytesForCurrentThread() - before;

        Assert.Equal(0, allocated);
    }

    private static void Fail(string where, Exception error) => Assert.Fail($"{where}: {error}");

    private static Phasors Frame(int value, int channels = Channels)
    {
        var frame = new Phasors(channels) { At = new RowInstant(value, value, value) };
        frame.Re.Fill(value);
        frame.Im.Fill(-value);
        frame.Validity.Fill(Validity.Bridged);
        return frame;
    }
}
