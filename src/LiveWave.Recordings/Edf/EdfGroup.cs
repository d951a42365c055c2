using System.Globalization;

namespace LiveWave.Recordings;

/// <summary>The signals of one rate: one stream.</summary>
/// <param name="Described">What is said of the stream.</param>
/// <param name="Signals">At least one, in the order of the file; all with the same number of samples per record.</param>
internal sealed record EdfGroup(StreamDescription Described, IReadOnlyList<EdfSignal> Signals)
{
    /// <summary>Samples of each signal in a data record.</summary>
    public int SamplesPerRecord => Signals[0].SamplesPerRecord;

    /// <summary>Groups the signals of a file, the group of most signals first.</summary>
    /// <param name="header">Its header.</param>
    public static IReadOnlyList<EdfGroup> Of(EdfHeader header)
    {
        var groups = header.Signals
            .Where(signal => !signal.IsAnnotations && signal.SamplesPerRecord > 0)
            .GroupBy(signal => signal.SamplesPerRecord)
            .OrderByDescending(group => group.Count());      // stable: of equals the first in the file
        return [.. groups.Select((group, place) => Make(header, [.. group], place + 1))];
    }

    private static EdfGroup Make(EdfHeader header, EdfSignal[] signals, int number)
    {
        var rateHz = signals[0].SamplesPerRecord / header.RecordSeconds;
        var described = new StreamDescription(
            "#" + number.ToString(CultureInfo.InvariantCulture),
            rateHz.ToString(CultureInfo.InvariantCulture) + " Hz",
            "signals",
            signals.Length,
            rateHz,
            header.SampleBytes == 3 ? "int24" : "int16",
            header.SampleBytes == 3 ? Abstractions.WireFormat.Int24 : Abstractions.WireFormat.Int16,
            [.. signals.Select(Channel)],
            signals.FirstOrDefault(signal => signal.Problem.Length > 0)?.Problem ?? "")
        {
            RowCount = header.Records * signals[0].SamplesPerRecord,
        };
        return new EdfGroup(described, signals);
    }

    private static RecordedChannel Channel(EdfSignal signal) =>
        new(signal.Label, signal.Unit, signal.Scaling.Scale, double.NaN, double.NaN, signal.Scaling.Offset);
}
