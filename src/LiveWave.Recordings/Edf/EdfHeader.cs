namespace LiveWave.Recordings;

/// <summary>What an EDF header says of the data behind it. Who was recorded, with what and by whom is never read.</summary>
/// <param name="SampleBytes">2 for EDF, 3 for BDF.</param>
/// <param name="IsDiscontinuous">The file says that time may jump from record to record.</param>
/// <param name="RecordSeconds">Duration of a data record, 0 or more.</param>
/// <param name="Signals">In the order of the file.</param>
/// <param name="Records">Whole data records that are there to read.</param>
internal sealed record EdfHeader(
    int SampleBytes,
    bool IsDiscontinuous,
    double RecordSeconds,
    IReadOnlyList<EdfSignal> Signals,
    long Records)
{
    /// <summary>Bytes of the fixed part, and of the part of each signal.</summary>
    public const int PartBytes = 256;

    /// <summary>Bytes before the first data record.</summary>
    public long HeaderBytes { get; } = PartBytes * (Signals.Count + 1L);

    /// <summary>Bytes of one data record.</summary>
    public long RecordBytes { get; } = Signals.Sum(signal => (long)signal.SamplesPerRecord) * SampleBytes;

    /// <summary>The signals that carry annotations; the first one also carries the time of each record.</summary>
    public IReadOnlyList<EdfSignal> Annotations { get; } = [.. Signals.Where(signal => signal.IsAnnotations && signal.SamplesPerRecord > 0)];

    /// <summary>Period of the fastest signal, seconds; NaN if there is none.</summary>
    public double ShortestPeriodSeconds { get; } =
        RecordSeconds / Signals.Where(signal => !signal.IsAnnotations).Select(signal => (double)signal.SamplesPerRecord).DefaultIfEmpty(double.NaN).Max();

    /// <summary>Where a data record begins.</summary>
    /// <param name="record">From 0.</param>
    public long RecordStart(long record) => HeaderBytes + (record * RecordBytes);
}
