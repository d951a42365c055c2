using LiveWave.Abstractions;

namespace LiveWave.Recordings.Tests;

public sealed class ChannelTableTests : IDisposable
{
    private readonly ScratchFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Channels_come_in_the_order_of_the_table_with_type_units_and_status()
    {
        var read = Read("name\ttype\tunits\tlow_cutoff\tstatus\nr2c1\tECOG\tuV\t0.1\tgood\nr1c1\tECOG\tuV\tn/a\tbad\nstim\tn/a\tn/a\tn/a\tn/a\n");

        Assert.Equal(
            [new TableChannel("r2c1", "ECOG", "uV", true), new("r1c1", "ECOG", "uV", false), new("stim", "", "", null)],
            read);
    }

    [Fact]
    public void Without_a_column_of_status_none_is_known()
    {
        Assert.Null(Assert.Single(Read("name\ttype\tunits\nr1c1\tECOG\tuV\n")).IsGood);
    }

    [Theory]
    [InlineData("name\ttype\n", "line 1: column 'units' is missing; it has name, type")]
    [InlineData("name\ttype\tunits\nn/a\tECOG\tuV\n", "line 2, column 'name': the channel has no name")]
    [InlineData("name\ttype\tunits\na\tECOG\tuV\na\tECOG\tuV\n", "line 3, column 'name': 'a' is there twice; the other is in line 2")]
    [InlineData("name\ttype\tunits\tstatus\na\tECOG\tuV\tgood\nb\tECOG\tuV\tnoisy\n", "line 3, column 'status': status 'noisy' is not known; write good, bad or n/a")]
    public void What_is_wrong_is_told_with_line_and_column(string text, string said)
    {
        Assert.Contains(said, Assert.Throws<RefusedException>(() => Read(text)).Message);
    }

    private IReadOnlyList<TableChannel> Read(string text) => ChannelTable.Read(_folder.Write("channels.tsv", text));
}
