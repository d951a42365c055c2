using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class XdfDamageTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_file_cut_anywhere_gives_its_whole_rows_and_names_the_cut()
    {
        var (bytes, rowEnds, chunkEnds, headersEnd) = Small();

        for (var cut = 0; cut < bytes.Length; cut++)
        {
            var path = _folder.Write("cut.dat", bytes.AsSpan(0, cut));
            if (cut < headersEnd)
            {
                Assert.Throws<RefusedException>(() => Played.File(path));
                continue;
            }

            var played = Played.File(path, 4);
            Assert.Equal(rowEnds.Count(end => end <= cut), played.Rows.Count);
            Assert.Equal(Enumerable.Range(0, played.Rows.Count).Select(i => (double)i), played.Rows.Select(row => row[0]));
            if (chunkEnds.Contains(cut)) Assert.Empty(played.Warnings);
            else Assert.Contains("the file ends inside", played.Warned.Replace("a chunk reaches", "the file ends inside", StringComparison.Ordinal));
        }
    }

    [Fact]
    public void Flipped_bits_never_crash_and_never_give_more_rows_than_there_are()
    {
        var (bytes, rowEnds, _, _) = Small();
        var draw = new Seeded(4);
        var refused = 0;

        for (var trial = 0; trial < 600; trial++)
        {
            var damaged = (byte[])bytes.Clone();
            for (var flips = 1 + draw.Below(3); flips > 0; flips--) damaged[draw.Below(damaged.Length)] ^= (byte)(1 << draw.Below(8));
            var path = _folder.Write("flipped.dat", damaged);
            try
            {
                Assert.True(Played.File(path, 4).Rows.Count <= rowEnds.Count);
            }
            catch (RefusedException)
            {
                refused++;
            }
        }

        Assert.InRange(refused, 1, 400);
    }

    [Fact]
    public void Random_bytes_behind_the_headers_never_crash()
    {
        var draw = new Seeded(5);
        for (var trial = 0; trial < 200; trial++)
        {
            var builder = new XdfBuilder().Stream(1, "array", 2, "10", "int16");
            var noise = new byte[400];
            for (var i = 0; i < noise.Length; i++) noise[i] = draw.Below(3) == 0 ? (byte)draw.Below(9) : (byte)draw.Next();
            builder.Raw(noise).Boundary().Samples(1, (9.0, [1, 2]));

            var played = Played.File(_folder.Write("noise.dat", builder.Bytes), 4);

            Assert.Equal([1.0, 2.0], played.Rows[^1]);
        }
    }

    [Fact]
    public void Reading_goes_on_at_the_next_boundary_and_says_where_it_was_lost_and_what_it_cost()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]));
        var damage = builder.Length;
        builder.Raw([3, 1, 2, 3]).Samples(1, (2.0, [2])).Boundary();
        var sound = builder.Length;
        builder.Samples(1, (3.0, [3]), (null, [4]));
        var path = _folder.Write("lost.dat", builder.Bytes);

        var played = Played.File(path);

        Assert.Equal([1, 3, 4], played.Rows.Select(row => row[0]));
        Assert.Equal([1.0, 3.0, 3.1], played.Stamps);
        var warning = Assert.Single(played.Warnings);
        Assert.Equal($"{path}, byte {damage}", warning.Where);
        Assert.Equal("this is no length of a chunk", warning.What);
        Assert.Equal($"{sound - damage} bytes skipped", warning.Advice);
        Assert.Equal(StatusLevel.Warning, warning.Level);
    }

    [Fact]
    public void After_a_loss_rows_are_left_out_until_one_has_its_own_stamp()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1])).Raw([0]).Boundary()
            .Samples(1, (null, [2]), (null, [3]), (5.0, [4]), (null, [5]));

        var played = Played.File(_folder.Write("lost.dat", builder.Bytes));

        Assert.Equal([1, 4, 5], played.Rows.Select(row => row[0]));
        Assert.Equal([1.0, 5.0, 5.1], played.Stamps);
        Assert.Contains("2 rows before this place have no stamp", played.Warned);
    }

    [Fact]
    public void A_stamp_that_is_no_number_leaves_its_row_out()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (double.NaN, [1]), (2.0, [2]), (double.PositiveInfinity, [3]));

        var played = Played.File(_folder.Write("stamps.dat", builder.Bytes));

        Assert.Equal([[2.0]], played.Rows);
        Assert.Equal(2, played.Warnings.Count(warning => warning.What.StartsWith("1 rows", StringComparison.Ordinal)));
    }

    [Fact]
    public void A_wrong_stamp_byte_costs_its_chunk_and_no_row_of_it_is_given_shifted()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]));
        var chunk = builder.Length;
        builder.Samples(1, (2.0, [2]), (null, [3]), (null, [4])).Samples(1, (3.0, [5]));
        var bytes = builder.Bytes;
        bytes[chunk + 5 + 2 + 4 + 5] = 0;        // length, tag, stream, number of samples, then the first stamp byte: 8 becomes 0

        var played = Played.File(_folder.Write("stamp.dat", bytes));

        Assert.Equal([1, 5], played.Rows.Select(row => row[0]));
        Assert.Single(played.Warnings);
    }

    [Fact]
    public void A_length_that_jumps_across_a_boundary_does_not_hide_it()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Stream(2, "markers", 1, "0", "string").Samples(1, (1.0, [1]));
        var wrong = builder.Length;
        builder.Chunk(77, [1, 2, 3]).Boundary().Samples(1, (2.0, [2])).Boundary().Samples(1, (3.0, [3])).Footer(1);
        var bytes = builder.Bytes;
        bytes[wrong + 1] = 60;

        var played = Played.File(_folder.Write("jump.dat", bytes), stream: "array");

        Assert.Equal([1, 2, 3], played.Rows.Select(row => row[0]));
    }

    [Fact]
    public void The_signature_inside_samples_is_no_place_to_go_on()
    {
        double[] values = [.. XdfBuilder.Signature.ToArray().Select(one => (double)(sbyte)one), 1, 12, 99, 0];      // and what could be a chunk
        var builder = new XdfBuilder().Stream(1, "array", 20, "10", "int8").Samples(1, (1.0, new double[20])).Raw([0])
            .Samples(1, (2.0, values)).Boundary().Samples(1, (3.0, values));

        var played = Played.File(_folder.Write("signature.dat", builder.Bytes));

        Assert.Equal([1.0, 3.0], played.Stamps);
        Assert.Equal(values, played.Rows[1]);
        Assert.Single(played.Warnings);
    }

    [Theory]
    [InlineData(int.MaxValue)]
    [InlineData(1UL << 63)]
    [InlineData(ulong.MaxValue)]
    [InlineData(0)]
    [InlineData(1)]
    public void A_hostile_length_of_a_chunk_costs_no_more_than_the_way_to_the_next_boundary(ulong length)
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]))
            .Raw([8, .. XdfBuilder.Number(length), 3, 0, 1, 0, 0, 0]).Boundary().Samples(1, (2.0, [2]));

        var played = Played.File(_folder.Write("hostile.dat", builder.Bytes));

        Assert.Equal([1, 2], played.Rows.Select(row => row[0]));
        Assert.Single(played.Warnings);
    }

    [Theory]
    [InlineData(int.MaxValue)]
    [InlineData(1UL << 63)]
    [InlineData(ulong.MaxValue)]
    public void A_hostile_number_of_samples_is_compared_with_the_chunk_first(ulong samples)
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Samples(1, (1.0, [1]))
            .Chunk(3, [1, 0, 0, 0, 8, .. XdfBuilder.Number(samples), 0, 1, 1]).Samples(1, (2.0, [2]));

        var before = GC.GetAllocatedBytesForCurrentThread();
        var played = Played.File(_folder.Write("hostile.dat", builder.Bytes));

        Assert.Equal([1, 2], played.Rows.Select(row => row[0]));
        Assert.True(GC.GetAllocatedBytesForCurrentThread() - before < 4 << 20);
    }

    [Fact]
    public void Thousands_of_damaged_places_give_a_bounded_list_of_warnings()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16");
        for (var i = 0; i < 1000; i++) builder.Samples(1, (i, [i])).Raw([0]).Boundary();

        var played = Played.File(_folder.Write("holes.dat", builder.Bytes));

        Assert.Equal(1000, played.Rows.Count);
        Assert.Equal(201, played.Warnings.Count);
        Assert.Contains("more than 200 warnings", played.Warned);
    }

    [Fact]
    public void A_stream_whose_header_is_lost_does_not_cost_the_others()
    {
        var builder = new XdfBuilder().Stream(1, "array", 1, "10", "int16").Raw([0]).Stream(2, "lost", 1, "10", "int16").Boundary()
            .Samples(2, (1.0, [9])).Samples(1, (1.0, [1])).Samples(2, (2.0, [9])).Samples(1, (2.0, [2]));

        var file = RecordingFile.Open(_folder.Write("header.dat", builder.Bytes));

        Assert.Equal(["array"], file.Streams.Select(stream => stream.Name));
        using var feed = file.OpenFeed();
        Assert.Equal([1, 2], Played.Feed(feed, 8).Rows.Select(row => row[0]));
    }

    // Ends of rows, of chunks that leave nothing to complain of, and of the last header.
    private static (byte[] Bytes, List<int> RowEnds, HashSet<int> ChunkEnds, int HeadersEnd) Small()
    {
        var builder = new XdfBuilder().Stream(2, "markers", 1, "0", "string").Stream(1, "array", 2, "10", "int16", XdfBuilder.Channels("a", "b"));
        var headersEnd = builder.Length;
        var rowEnds = new List<int>();
        var chunkEnds = new HashSet<int> { headersEnd };
        var number = 0;
        for (var chunk = 0; chunk < 6; chunk++)
        {
            var start = builder.Length;
            var second = number + 1;
            builder.Samples(1, (chunk, [number, 5]), (null, [second, 5]), (null, [second + 1, 5]));
            rowEnds.AddRange([start + 16 + 9 + 4, start + 16 + 9 + 4 + 5, start + 16 + 9 + 4 + 10]);
            number += 3;
            chunkEnds.Add(builder.Length);
            chunkEnds.Add(builder.Clock(1, chunk, 0).Length);
            chunkEnds.Add(builder.Markers(2, (chunk, "on")).Length);
            if (chunk % 2 == 1) chunkEnds.Add(builder.Boundary().Length);
        }

        builder.Footer(1);
        return (builder.Bytes, rowEnds, chunkEnds, headersEnd);
    }
}
