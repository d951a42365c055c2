using System.Globalization;
using LiveWave.Abstractions;

namespace LiveWave.Recordings;

/// <summary>What a recording says of one of its streams.</summary>
/// <param name="Key"><c>#</c> and its number in the file: tells streams of one name apart.</param>
/// <param name="Name">Its name; may be empty or used twice.</param>
/// <param name="Type">What it carries, e.g. <c>EEG</c> or <c>Markers</c>.</param>
/// <param name="ChannelCount">As declared; 0 where the declaration is no use.</param>
/// <param name="NominalRateHz">Samples per second; 0 for an irregular stream, NaN where the declaration is no use.</param>
/// <param name="SampleFormat">The file's own word for the form of a sample.</param>
/// <param name="Wire">That form where it is a number, null for text.</param>
/// <param name="Channels">Those the file describes, in sample order; may be fewer than <paramref name="ChannelCount"/>.</param>
/// <param name="Problem">Why the stream can't be read; empty if it can.</param>
public sealed record StreamDescription(
    string Key,
    string Name,
    string Type,
    int ChannelCount,
    double NominalRateHz,
    string SampleFormat,
    WireFormat? Wire,
    IReadOnlyList<RecordedChannel> Channels,
    string Problem)
{
    /// <summary>Rows the file holds, before what damage takes of them; null where only reading tells.</summary>
    public long? RowCount { get; init; }

    /// <summary>True if it can be read as a signal: numbers at a regular rate.</summary>
    public bool IsRegularSignal => Problem.Length == 0 && Wire is not null && NominalRateHz > 0;

    /// <summary>One line for a list: name, number, type, channels, rate, form.</summary>
    public override string ToString()
    {
        var rate = NominalRateHz > 0 ? NominalRateHz.ToString("0.###", CultureInfo.InvariantCulture) + " Hz" : "irregular";
        var what = Problem.Length > 0 ? Problem : $"{PlainText.Of(Type)}, {ChannelCount} channels, {rate}, {PlainText.Of(SampleFormat)}";
        return $"'{PlainText.Of(Name)}' {Key} ({what})";
    }

    /// <summary>Why this stream can't be read as a signal.</summary>
    /// <param name="where">The file.</param>
    internal RefusedException Refusal(string where)
    {
        var at = $"{where}, stream '{PlainText.Of(Name)}' {Key}";
        if (Problem.Length > 0) return new RefusedException(Problem, at, "this stream can't be read");
        return Wire is null
            ? new RefusedException("it carries text, not a signal", at, "choose a regular stream of numbers")
            : new RefusedException("it is irregular (nominal rate 0)", at, "a signal needs a nominal rate above 0 Hz");
    }

    /// <summary>The stream's format: labels unique, channels that the file doesn't describe named by their number.</summary>
    /// <param name="warnings">Told where a label had to be made up or changed.</param>
    internal StreamFormat ToFormat(ReadWarnings warnings)
    {
        var channels = new ChannelFormat[ChannelCount];
        var labels = new HashSet<string>(StringComparer.Ordinal);
        var unnamed = 0;
        for (var i = 0; i < ChannelCount; i++)
        {
            var told = i < Channels.Count ? Channels[i] : new RecordedChannel("", "", 1, double.NaN, double.NaN);
            if (told.Label.Length == 0) unnamed++;
            channels[i] = new ChannelFormat(Unique(told.Label, i, labels, warnings), told.Unit, told.Conversion, told.Offset);
        }

        if (unnamed > 0)
        {
            warnings.Add($"{unnamed} of {ChannelCount} channels of '{PlainText.Of(Name)}' have no label", "they are called ch and their number");
        }

        return new StreamFormat(Name, NominalRateHz, Wire!.Value, channels);
    }

    private static string Unique(string label, int channel, HashSet<string> labels, ReadWarnings warnings)
    {
        var number = (channel + 1).ToString(CultureInfo.InvariantCulture);
        var unique = label.Length == 0 ? "ch" + number : label;
        if (labels.Add(unique)) return unique;
        while (!labels.Add(unique)) unique += "-" + number;
        warnings.Add($"channel {number} has a label that is used before: '{PlainText.Of(label)}'", $"it is called '{PlainText.Of(unique)}'");
        return unique;
    }
}
