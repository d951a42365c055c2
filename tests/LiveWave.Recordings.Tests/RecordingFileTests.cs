using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class RecordingFileTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_missing_file_and_a_folder_are_refused()
    {
        Assert.Contains("no such file", Refusal(_folder.Path("absent.xdf")));
        Assert.Contains("no such file", Refusal(_folder.Path("no/such/folder.xdf")));
        Assert.Contains("this is a folder", Refusal(_folder.Path("")));
    }

    [Theory]
    [InlineData("", "the file is empty")]
    [InlineData("XD", "its first bytes are 58 44 ('XD')")]
    [InlineData("time,value\n1,2\n", "its first bytes are 74 69 6D 65 2C 76 61 6C ('time,val'); give a recording in XDF, EDF or BDF")]
    [InlineData("0       ", "the file ends inside its header: 8 bytes of 256")]
    public void A_file_of_another_kind_is_told_by_its_first_bytes(string content, string said)
    {
        Assert.Contains(said, Refusal(_folder.Write("recording.xdf", content)));
    }

    [Theory]
    [InlineData(new byte[] { 0x1F, 0x8B, 8, 0 }, "compressed")]
    [InlineData(new byte[] { 0xFF, 0x42, 0x49, 0x4F }, "BDF with FF")]
    [InlineData(new byte[] { 0xEF, 0xBF, 0xBD, 0x42 }, "a transfer as text has replaced bytes (EF BF BD)")]
    [InlineData(new byte[] { 0x89, 0x48, 0x44, 0x46 }, "HDF5 or NWB")]
    public void A_file_of_a_known_other_kind_is_called_by_its_name(byte[] content, string said)
    {
        Assert.Contains(said, Refusal(_folder.Write("recording.xdf", content)));
    }

    [Fact]
    public void A_file_without_a_stream_says_so()
    {
        var path = _folder.Write("empty.dat", new XdfBuilder().Bytes);

        Assert.Contains("holds no stream", Assert.Throws<RefusedException>(() => RecordingFile.Open(path).OpenFeed()).Message);
    }

    [Fact]
    public void The_only_regular_stream_of_numbers_is_chosen_by_itself()
    {
        var path = Write(new XdfBuilder().Stream(4, "markers", 1, "0", "string").Stream(2, "array", 3, "1000", "float32")
            .Stream(3, "gaze", 2, "0", "double64").Stream(9, "timed-text", 1, "10", "string"));

        using var feed = RecordingFile.Open(path).OpenFeed();

        Assert.Equal("array", feed.Format.Name);
        Assert.Equal("#2", feed.Stream.Key);
    }

    [Fact]
    public void Several_signals_are_listed_for_a_choice()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 3, "1000", "float32").Stream(2, "eye", 2, "60", "int16"));

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(path).OpenFeed()).Message;

        Assert.Contains("2 regular streams of numbers; say which one by its name: 'array' #1 (LFP, 3 channels, 1000 Hz, float32), 'eye' #2 (LFP, 2 channels, 60 Hz, int16)", said);
    }

    [Fact]
    public void A_stream_that_is_not_there_is_answered_by_what_is()
    {
        var path = Write(new XdfBuilder().Stream(1, "array", 3, "1000", "float32").Stream(2, "cues", 1, "0", "string"));

        var said = Assert.Throws<RefusedException>(() => RecordingFile.Open(path).OpenFeed("arrays")).Message;

        Assert.Contains("no stream is called 'arrays'; the file holds 'array' #1", said);
        Assert.Contains("'cues' #2 (LFP, 1 channels, irregular, string)", said);
    }

    [Fact]
    public void Streams_of_one_name_are_told_apart_by_their_number()
    {
        var file = RecordingFile.Open(Write(new XdfBuilder().Stream(5, "array", 1, "10", "int8").Stream(6, "array", 2, "10", "int8")));

        Assert.Contains("say which one by its number: 'array' #5", Assert.Throws<RefusedException>(() => file.Choose("array")).Message);
        Assert.Equal(2, file.Choose("#6").ChannelCount);
    }

    [Fact]
    public void A_name_that_markers_share_means_the_signal()
    {
        var file = RecordingFile.Open(Write(new XdfBuilder().Stream(5, "array", 1, "0", "string").Stream(6, "array", 2, "10", "int8")));

        Assert.Equal("#6", file.Choose("array").Key);
    }

    private static string Refusal(string path) => Assert.Throws<RefusedException>(() => RecordingFile.Open(path)).Message;

    private string Write(XdfBuilder builder) => _folder.Write("recording.dat", builder.Bytes);
}
