using LiveWave.App;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.Benchmarks;

/// <summary>The bundled session's setup, with rules that do not rest, so that pulses come often.</summary>
internal static class DemoSetup
{
    public static RunSetup WithoutRest()
    {
        var sheet = SheetReader.Read(Path.Combine(AppContext.BaseDirectory, "replay-data", "millrace.sheet.toml"));
        using var feed = RecordingFile.Open(sheet.PathOf(sheet.Stream.File!)).OpenFeed(sheet.Stream.Name);
        var patches = sheet.Patches.Select(patch => PatchReader.Read(sheet, patch, feed.Format)).ToList();
        var calibrations = CalibrationChoice.Make(sheet, patches, feed.Format);
        var setup = new RunSetupBuilder(sheet, feed.Format, BuiltInParts.Catalog(), new VirtualClock()).Build(patches, calibrations.Of, "benchmark");
        return setup with { Rules = [.. setup.Rules.Select(rule => rule with { RestMs = 0 })] };
    }
}
