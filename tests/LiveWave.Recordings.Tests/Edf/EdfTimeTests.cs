using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class EdfTimeTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void In_a_discontinuous_file_the_stamps_jump_where_the_records_do()
    {
        var played = Played.File(Write("D", "+0.25", "+1.25", "+7.5", "+8.5"));

        Assert.Equal([0.25, 0.75, 1.25, 1.75, 7.5, 8, 8.5, 9], played.Stamps);
        Assert.Equal([0, 1, 2, 3, 4, 5, 6, 7], played.Rows.Select(row => row[0]));
        Assert.Empty(played.Warnings);
    }

    [Fact]
    public void A_file_may_begin_a_fraction_of_a_second_after_the_start_in_its_header()
    {
        var played = Played.File(Write("C", "+0.2500000", "+1.2500000"));

        Assert.Equal([0.25, 0.75, 1.25, 1.75], played.Stamps);
        Assert.Empty(played.Warnings);
    }

    [Fact]
    public void A_file_that_calls_itself_continuous_and_jumps_is_read_as_discontinuous_with_a_warning()
    {
        var path = Write("C", "+0", "+1", "+5", "+6", "+9");

        var played = Played.File(path);

        Assert.Equal([0, 0.5, 1, 1.5, 5, 5.5, 6, 6.5, 9, 9.5], played.Stamps);
        var warning = Assert.Single(played.Warnings);
        Assert.Equal($"{path}, byte {768 + (2 * 44) + 4}", warning.Where);
        Assert.Contains("time jumps", warning.What);
    }

    [Theory]
    [InlineData("C")]
    [InlineData("D")]
    public void Times_that_differ_by_less_than_half_a_sample_are_taken_as_they_are(string kind)
    {
        var played = Played.File(Write(kind, "+0", "+1.2", "+2", "+3"));

        Assert.Equal([0, 0.5, 1.2, 1.7, 2, 2.5, 3, 3.5], played.Stamps);
        Assert.Empty(played.Warnings);
    }

    [Fact]
    public void Times_written_too_coarsely_for_a_fast_rate_make_no_gap_in_a_continuous_file()
    {
        var builder = EdfBuilder.Plus("C", "0.0333").Signal("a", 999).Annotations();
        foreach (var time in (string[])["+0", "+0.033", "+0.067", "+0.100"]) builder.Record(new int[999], EdfBuilder.Time(time));

        var played = Played.File(_folder.Write("fast.edf", builder.Bytes));

        Assert.All(played.Stamps.Zip(played.Stamps.Skip(1)), pair => Assert.InRange((pair.Second - pair.First) * 30000, 0.999, 1.001));
        Assert.Empty(played.Warnings);
    }

    [Theory]
    [InlineData("C")]
    [InlineData("D")]
    public void Records_that_overlap_or_go_backwards_are_refused_with_their_place(string kind)
    {
        var path = Write(kind, "+0", "+1", "+1.7");

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(path)).Message;

        Assert.Contains($"byte {768 + (2 * 44) + 4}: data record 2 begins at 1.7 s, before the one before it ends (2 s)", said);
    }

    [Fact]
    public void A_record_without_its_time_follows_the_one_before_in_a_continuous_file()
    {
        var path = Write("C", "+0", "1", "+2", "+3\u0015");

        var played = Played.File(path);

        Assert.Equal([0, 0.5, 1, 1.5, 2, 2.5, 3, 3.5], played.Stamps);
        Assert.Contains("2 of 4 data records don't begin with their time", Assert.Single(played.Warnings).What);
    }

    [Fact]
    public void A_record_without_its_time_is_left_out_of_a_discontinuous_file()
    {
        var played = Played.File(Write("D", "", "+1", "+two", "+8", "+9"));

        Assert.Equal([1, 1.5, 8, 8.5, 9, 9.5], played.Stamps);
        Assert.Equal([2, 3, 6, 7, 8, 9], played.Rows.Select(row => row[0]));
        Assert.Contains("2 of 5 data records", Assert.Single(played.Warnings).What);
    }

    [Fact]
    public void A_record_behind_one_without_its_time_may_not_begin_before_that_one_can_have_ended()
    {
        var path = Write("D", "+0", "", "+1.5");

        Assert.Contains("data record 2 begins at 1.5 s", Assert.Throws<RefusedException>(() => RecordingFile.Open(path)).Message);
    }

    [Fact]
    public void An_event_in_the_place_of_the_time_is_not_taken_for_it()
    {
        var builder = EdfBuilder.Plus("C").Signal("a", 2).Annotations()
            .Record(EdfBuilder.Numbers(1, 2), EdfBuilder.Time("+0")).Record(EdfBuilder.Numbers(3, 4), "+7.5\u0014cue\u0014\0");

        Assert.Equal([0, 0.5, 1, 1.5], Played.File(_folder.Write("event.edf", builder.Bytes)).Stamps);
    }

    [Fact]
    public void A_discontinuous_file_without_annotations_is_refused()
    {
        var builder = EdfBuilder.Plus("D").Signal("a", 2).Record(EdfBuilder.Numbers(1, 2));

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(_folder.Write("times.edf", builder.Bytes))).Message;

        Assert.Contains("byte 192: the file calls itself discontinuous", said);
    }

    private string Write(string kind, params string[] times)
    {
        var builder = EdfBuilder.Plus(kind).Signal("a", 2).Annotations();
        for (var i = 0; i < times.Length; i++) builder.Record(EdfBuilder.Numbers(2 * i, (2 * i) + 1), EdfBuilder.Time(times[i]));
        return _folder.Write("recording.dat", builder.Bytes);
    }
}
