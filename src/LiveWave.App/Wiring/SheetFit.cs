using LiveWave.Abstractions;
using LiveWave.Dsp;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>Holds the stream that came against the one that the sheet expects.</summary>
internal static class SheetFit
{
    private const double RateTolerance = 1e-6;

    /// <exception cref="RefusedException">Rate or channel count differ, or the rate can't be brought down as the sheet wants.</exception>
    public static void Check(SessionSheet sheet, StreamFormat format, string recording)
    {
        var expected = sheet.Stream;
        if (double.IsFinite(expected.RateHz) && Math.Abs((format.NominalRateHz / expected.RateHz) - 1) > RateTolerance)
        {
            throw new RefusedException(
                $"the stream has {format.NominalRateHz} Hz, the sheet expects {expected.RateHz} Hz",
                recording,
                $"play another recording, or mend rateHz in {sheet.File}");
        }

        if (expected.Channels is { } channels && channels != format.ChannelCount)
        {
            throw new RefusedException(
                $"the stream has {format.ChannelCount} channels, the sheet expects {channels}",
                recording,
                $"play another recording, or mend channels in {sheet.File}");
        }

        var analysisRateHz = sheet.Conditioning.AnalysisRateHz;
        if (double.IsFinite(analysisRateHz) && Decimator.Refusal(format.NominalRateHz, analysisRateHz) is var (what, advice))
        {
            throw new RefusedException($"analysisRateHz is {analysisRateHz}: {what}", $"{sheet.File}, conditioning", advice);
        }

        foreach (var band in sheet.Bands)
        {
            if (band.HighHz < format.NominalRateHz / 2) continue;
            throw new RefusedException(
                $"band '{band.Name}' reaches {band.HighHz} Hz, and a rate of {format.NominalRateHz} Hz carries less than {format.NominalRateHz / 2} Hz",
                sheet.File,
                "lower highHz");
        }
    }
}
