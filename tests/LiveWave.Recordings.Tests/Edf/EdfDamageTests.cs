using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class EdfDamageTests : IDisposable
{
    private const int RecordBytes = (2 * 2 * 2) + 40;

    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_file_cut_anywhere_gives_its_whole_records_and_names_the_cut()
    {
        var (bytes, headerBytes) = Small();

        for (var cut = 0; cut < bytes.Length; cut++)
        {
            var path = _folder.Write("cut.dat", bytes.AsSpan(0, cut));
            if (cut < headerBytes)
            {
                Assert.Throws<RefusedException>(() => Played.File(path));
                continue;
            }

            var played = Played.File(path, 4);
            var whole = (cut - headerBytes) / RecordBytes;
            Assert.Equal(Enumerable.Range(0, 2 * whole).Select(i => (double)i), played.Rows.Select(row => row[0]));
            Assert.Contains($"the header says 6 data records; the file holds {whole}", played.Warned);
            var left = (cut - headerBytes) % RecordBytes;
            if (left > 0) Assert.Contains($"byte {cut - left}: the last data record is incomplete; {left} bytes skipped", played.Warned);
            Assert.Equal(whole, EdfAnnotations.Read(path).Markers.Count);
        }
    }

    [Theory]
    [InlineData(1024)]
    [InlineData(int.MaxValue)]
    public void Damage_never_crashes_never_costs_much_memory_and_never_shows_who_was_recorded(int within)
    {
        var (bytes, _) = Small();
        var draw = new Seeded((ulong)within);
        var refused = 0;
        var before = GC.GetAllocatedBytesForCurrentThread();

        for (var trial = 0; trial < 400; trial++)
        {
            var damaged = (byte[])bytes.Clone();
            for (var flips = 1 + draw.Below(4); flips > 0; flips--)
            {
                var at = draw.Below(Math.Min(within, damaged.Length));
                damaged[at] = draw.Below(2) == 0 ? (byte)draw.Next() : (byte)" 0123456789+-.,eE"[draw.Below(17)];
            }

            var path = _folder.Write("damaged.dat", damaged);
            try
            {
                var played = Played.File(path, 4, "#1");
                Assert.True(played.Rows.Count <= bytes.Length / 2);
                Assert.DoesNotContain(EdfBuilder.Secret, played.Warned);
                _ = EdfAnnotations.Read(path);
            }
            catch (RefusedException refusal)
            {
                Assert.DoesNotContain(EdfBuilder.Secret, refusal.Message);
                refused++;
            }
        }

        Assert.InRange(refused, 1, 399);
        Assert.True((GC.GetAllocatedBytesForCurrentThread() - before) / 400 < 4 << 20);
    }

    [Fact]
    public void A_header_of_noise_is_refused_or_read_and_never_crashes()
    {
        var draw = new Seeded(9);
        for (var trial = 0; trial < 300; trial++)
        {
            var noise = new byte[256 * 4];
            for (var i = 0; i < noise.Length; i++) noise[i] = (byte)"  00123456789-."[draw.Below(15)];
            var bytes = EdfBuilder.With(EdfBuilder.With(noise, 0, "0       "), 252, $"{1 + draw.Below(3)}   ");
            try
            {
                _ = Played.File(_folder.Write("noise.dat", bytes), 4, "#1");
            }
            catch (RefusedException refusal)
            {
                Assert.Contains("noise.dat", refusal.Message);
            }
        }
    }

    [Fact]
    public void The_longest_lies_a_header_can_tell_cost_no_memory()
    {
        var builder = new EdfBuilder { Records = "99999999" };
        for (var i = 0; i < 1000; i++) builder.Signal("c" + i, 99_999_999);
        var path = _folder.Write("hostile.edf", builder.Bytes);
        var before = GC.GetAllocatedBytesForCurrentThread();

        var played = Played.File(path, 1);

        Assert.Empty(played.Rows);
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 8 << 20);
    }

    [Fact]
    public void A_carriage_return_before_every_line_feed_is_recognised_as_a_transfer_as_text()
    {
        var (bytes, _) = Long();
        byte[] damaged = [.. bytes.SelectMany(one => one == '\n' ? "\r\n"u8.ToArray() : [one])];

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(_folder.Write("text.edf", damaged))).Message;

        Assert.Contains("a transfer as text has put a carriage return before every line feed", said);
        Assert.Contains("copy the original again, as binary", said);
    }

    [Fact]
    public void Bytes_replaced_by_the_replacement_character_are_recognised_as_a_transfer_as_text()
    {
        var (bytes, _) = Long();
        byte[] damaged = [.. bytes.SelectMany(one => one >= 0x80 ? [0xEF, 0xBF, 0xBD] : new[] { one })];

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(_folder.Write("text.edf", damaged))).Message;

        Assert.Contains("a transfer as text has replaced bytes by EF BF BD", said);
    }

    [Fact]
    public void A_sound_file_that_was_merely_cut_is_not_taken_for_a_transfer_as_text()
    {
        var (bytes, headerBytes) = Long();

        Assert.Equal(500, Played.File(_folder.Write("cut.edf", bytes.AsSpan(0, headerBytes + 1001))).Rows.Count);
    }

    [Fact]
    public void A_file_that_becomes_shorter_while_it_is_read_ends_with_a_warning()
    {
        var builder = new EdfBuilder().Signal("a", 1000);
        for (var record = 0; record < 200; record++) builder.Record(Enumerable.Repeat(record, 1000).ToArray());
        var path = _folder.Write("shrinking.edf", builder.Bytes);
        using var feed = RecordingFile.Open(path).OpenFeed();
        _folder.Write("shrinking.edf", builder.Bytes.AsSpan(0, 100_000));

        var played = Played.Feed(feed, 64);

        Assert.InRange(played.Rows.Count, 1, 60_000);
        Assert.Contains("the file became shorter while it was read", played.Warned);
    }

    [Fact]
    public void Thousands_of_odd_fields_give_a_bounded_list_of_warnings()
    {
        var builder = new EdfBuilder();
        for (var i = 0; i < 1000; i++) builder.Signal("c" + i, 1, "uV", "-1,5", "1,5");
        builder.Record([.. Enumerable.Repeat<object>(EdfBuilder.Numbers(1), 1000)]);

        var played = Played.File(_folder.Write("odd.edf", builder.Bytes));

        Assert.Single(played.Rows);
        Assert.Equal(201, played.Warnings.Count);
    }

    private static (byte[] Bytes, int HeaderBytes) Small()
    {
        var builder = EdfBuilder.Plus("D").Signal("a", 2).Signal("b", 2).Annotations();
        for (var record = 0; record < 6; record++)
        {
            var annotations = EdfBuilder.Time($"+{3 * record}") + $"+{3 * record}.5\u0014cue\u0014\0";
            builder.Record(EdfBuilder.Numbers(2 * record, (2 * record) + 1), EdfBuilder.Numbers(5, 5), annotations);
        }

        return (builder.Bytes, builder.HeaderLength);
    }

    // Long enough to hold every byte often.
    private static (byte[] Bytes, int HeaderBytes) Long()
    {
        var draw = new Seeded(6);
        var builder = new EdfBuilder().Signal("a", 50);
        for (var record = 0; record < 200; record++) builder.Record(Enumerable.Range(0, 50).Select(_ => draw.Below(65536) - 32768).ToArray());
        return (builder.Bytes, builder.HeaderLength);
    }
}
