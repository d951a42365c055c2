using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class EdfHeaderTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData(252, "0   ", "byte 252: the number of signals is '0'; a whole number from 1 to 4096")]
    [InlineData(252, "4097", "byte 252: the number of signals is '4097'")]
    [InlineData(252, "x2  ", "byte 252: the number of signals is '?2'")]
    [InlineData(252, "9   ", "the file ends inside its header: 788 bytes of 2560")]
    [InlineData(244, "-1      ", "byte 244: the duration of a data record is '-1'")]
    [InlineData(244, "NaN     ", "byte 244: the duration of a data record is '???'")]
    [InlineData(244, "Infinity", "byte 244: the duration of a data record is")]
    [InlineData(244, "0       ", "byte 244: the duration of a data record is '0'; signal 1 has samples, and so no rate")]
    [InlineData(244, "1E-320  ", "signal 1 has samples, and so no rate")]
    [InlineData(236, "many    ", "byte 236: the number of data records is '????'")]
    [InlineData(236, "-2      ", "byte 236: the number of data records is '-2'; a whole number from -1")]
    [InlineData(688, "-1      ", "byte 688: samples per record of signal 1 is '-1'")]
    [InlineData(696, "2.5     ", "byte 696: samples per record of signal 2 is '2.5'")]
    public void A_field_that_makes_no_sense_is_refused_with_its_place_and_text(int at, string text, string said)
    {
        var path = _folder.Write("header.edf", EdfBuilder.With(Sound(), at, text));

        Assert.Contains(said, Assert.Throws<RefusedException>(() => RecordingFile.Open(path)).Message);
    }

    [Theory]
    [InlineData(464, "32767   ", "byte 464: signal 1 has physical limits 32767 and 32767, which give no scale")]
    [InlineData(464, "low     ", "byte 464: the physical minimum of signal 1 is '???', not a number")]
    [InlineData(488, "1,2,3   ", "byte 488: the physical maximum of signal 2 is '1,2,3', not a number")]
    [InlineData(488, "1E999   ", "byte 488: the physical maximum of signal 2 is '1E999', not a number")]
    [InlineData(512, "-32768  ", "byte 512: signal 1 has a digital maximum -32768 that is not above its minimum -32768")]
    [InlineData(512, "        ", "byte 512: the digital maximum of signal 1 is '', not a number")]
    public void A_signal_without_a_scale_costs_its_stream(int at, string text, string said)
    {
        var path = _folder.Write("header.edf", EdfBuilder.With(Sound(), at, text));

        var file = RecordingFile.Open(path);

        Assert.Contains(said, Assert.Throws<RefusedException>(() => file.OpenFeed()).Message);
        Assert.False(Assert.Single(file.Streams).IsRegularSignal);
    }

    [Fact]
    public void A_decimal_comma_is_read_as_a_point_with_a_warning()
    {
        var path = _folder.Write("comma.edf", new EdfBuilder().Signal("a", 1, "uV", "-3276,8", "3276,7").Record(EdfBuilder.Numbers(10)).Bytes);

        var played = Played.File(path);

        Assert.Equal(1.0, played.Rows[0][0], 12);
        Assert.Equal(2, played.Warnings.Count);
        Assert.Contains("byte 360: the physical minimum of signal 1 '-3276,8' has a decimal comma", played.Warned);
    }

    [Fact]
    public void A_wrong_length_of_the_header_is_corrected_with_a_warning()
    {
        var path = _folder.Write("length.edf", new EdfBuilder { HeaderBytes = "4711" }.Signal("a", 1).Record(EdfBuilder.Numbers(10)).Bytes);

        var played = Played.File(path);

        Assert.Equal(10, played.Rows[0][0]);
        Assert.Contains("byte 184: the header's length is given as '4711'; 1 signals make it 512, which is used", played.Warned);
    }

    [Theory]
    [InlineData("-1", "byte 236: the number of data records was never written (-1): was the recording cut off?; the file holds 2")]
    [InlineData("5", "byte 236: the header says 5 data records; the file holds 2")]
    public void The_file_says_how_many_records_there_are(string told, string said)
    {
        var path = _folder.Write("records.edf", new EdfBuilder { Records = told }.Signal("a", 1).Record(EdfBuilder.Numbers(1)).Record(EdfBuilder.Numbers(2)).Bytes);

        var played = Played.File(path);

        Assert.Equal([1, 2], played.Rows.Select(row => row[0]));
        Assert.Contains(said, Assert.Single(played.Warned.Split('\n')));
    }

    [Fact]
    public void What_lies_behind_the_last_record_is_not_read()
    {
        var path = _folder.Write("behind.edf", new EdfBuilder { Records = "1" }.Signal("a", 1).Record(EdfBuilder.Numbers(1)).Raw(2, 0, 3).Bytes);

        var played = Played.File(path);

        Assert.Equal([[1.0]], played.Rows);
        Assert.Contains("byte 514: the file goes on behind its last data record; 3 bytes skipped", played.Warned);
    }

    [Fact]
    public void Blanks_before_and_NUL_behind_a_number_are_no_harm()
    {
        var bytes = EdfBuilder.With(EdfBuilder.With(Sound(), 236, "  2\0\0\0\0\0"), 244, "\0\0\0\0   1");

        Assert.Equal(4, Played.File(_folder.Write("padded.edf", bytes)).Rows.Count);
    }

    [Fact]
    public void A_signal_without_samples_is_left_out_with_a_warning()
    {
        var path = _folder.Write("none.edf", new EdfBuilder().Signal("a", 1).Signal("b", 0).Record(EdfBuilder.Numbers(1), Array.Empty<int>()).Bytes);

        var played = Played.File(path);

        Assert.Equal([[1.0]], played.Rows);
        Assert.Contains("byte 696: signal 2 has no samples; it is left out", played.Warned);
    }

    [Fact]
    public void A_file_of_annotations_alone_needs_no_duration_and_holds_no_signal()
    {
        var path = _folder.Write("notes.edf", EdfBuilder.Plus("C", "0").Annotations().Record("+0\u0014\u0014\0+1\u0014cue\u0014\0").Bytes);

        Assert.Contains("it carries text", Assert.Throws<RefusedException>(() => RecordingFile.Open(path).OpenFeed()).Message);
        Assert.Equal([new Marker("annotations", "cue", 1)], EdfAnnotations.Read(path).Markers);
    }

    // Two signals of two samples in two records: fields of the first signal at 256, 464 (physical minimum), 512 (digital maximum), 688.
    private static byte[] Sound() => new EdfBuilder().Signal("a", 2).Signal("b", 2)
        .Record(EdfBuilder.Numbers(1, 2), EdfBuilder.Numbers(3, 4)).Record(EdfBuilder.Numbers(5, 6), EdfBuilder.Numbers(7, 8)).Raw(0, 0, 0, 0).Bytes;
}
