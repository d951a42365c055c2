using System.Globalization;
using LiveWave.Abstractions;
using LiveWave.Pipeline;
using LiveWave.Recordings;

namespace LiveWave.App;

/// <summary>The verb <c>watch</c>, and <c>demo</c> on bundled files: plays a recording through the pipeline, rehearsing.</summary>
internal static class WatchVerb
{
    private static readonly TimeSpan Turn = TimeSpan.FromMilliseconds(500);

    /// <exception cref="RefusedException">Sheet, recording, layout or calibration can't be used.</exception>
    public static int Run(WatchOptions options)
    {
        var sheet = SheetReader.Read(options.SheetPath);
        var recording = options.From ?? RecordingOf(sheet);
        var file = RecordingFile.Open(recording);
        using var feed = file.OpenFeed(sheet.Stream.Name);
        SheetFit.Check(sheet, feed.Format, recording);
        using var wiring = WatchWiring.Make(sheet, feed, FirstStampSeconds(file, sheet), options);
        var time = WallClock.Time;
        var began = time.GetLocalNow();
        var folder = SessionFolder.Create(options.Out ?? FolderName(sheet, wiring.Setup.SessionId, options.SessionId is not null, began));
        wiring.WriteDocuments(folder, options, recording, began);
        var summary = Play(wiring, folder, options, recording, began);
        var text = SummaryText.Of(summary);
        File.WriteAllText(folder.At("summary.txt"), text);
        File.WriteAllText(folder.At("summary.json"), SummaryJson.Of(summary) + "\n");
        Console.Out.Write(options.Json ? SummaryJson.Of(summary) + "\n" : text);
        var hasFailed = summary.End is RunEnd.Fault or RunEnd.Lost || summary.Tally.Statuses.Any(status => status.Level == StatusLevel.Fault);
        return hasFailed ? ExitCode.Failed : ExitCode.Done;
    }

    private static RunSummary Play(WatchWiring wiring, SessionFolder folder, WatchOptions options, string recording, DateTimeOffset began)
    {
        using var tally = new RunTally(wiring.Surface);
        using var recorder = new SessionRecorder(folder, wiring.Surface, wiring.Board);
        using var thread = new DecisionThread(wiring.Loop, wiring.Gate);
        using var view = options.HasView ? wiring.View() : null;   // before the guard: the terminal is given back before a crash is told
        using var guard = new RunGuard(wiring.Gate, folder, thread.Stop);
        foreach (var note in wiring.NotesFor(options)) wiring.Board.Post(note.Level, note.Where, note.What, note.Advice);
        var collections = GC.CollectionCount(0);
        var pause = GC.GetTotalPauseDuration();
        wiring.Gate.Open();   // under the guard: from here on every way out brings the outputs to rest
        try
        {
            thread.Start();
            view?.Start();
            using var progress = new ProgressLine(wiring.Loop, isShown: !options.Json && view is null);
            while (!thread.Wait(Turn)) progress.Show();
        }
        finally
        {
            wiring.EndGate();   // first, whatever ended it: the guard and the threads are taken down after it
        }

        wiring.Ledger.Process(GC.CollectionCount(0) - collections, GC.GetTotalPauseDuration() - pause);
        foreach (var warning in wiring.FeedWarnings()) wiring.Board.Post(warning.Level, warning.Where, warning.What, warning.Advice);
        wiring.Loop.DrainAll();
        view?.Dispose();
        recorder.Dispose();       // writes the rest ...
        wiring.Loop.DrainAll();   // ... and what it could not write is told
        wiring.Surface.Complete();
        LatencyFiles.Write(folder, wiring.Ledger, began, WallClock.Time.GetLocalNow());
        if (thread.Failure is { } failure)
        {
            RunGuard.WriteCrash(folder, failure);
            Console.Error.WriteLine($"livewave: failed: {failure.Message}; see crash.txt in {folder.FullPath}");
        }

        return wiring.Summary(tally, folder, options, recording, thread.Failure is not null);
    }

    private static double FirstStampSeconds(RecordingFile file, SessionSheet sheet)
    {
        using var feed = file.OpenFeed(sheet.Stream.Name);
        var block = new SampleBlock(feed.Format, 1);
        return feed.Pull(block, TimeSpan.Zero) == PullResult.Samples
            ? block.RawStampSeconds(0)
            : throw new RefusedException("the stream holds no sample", file.Path, "play another recording");
    }

    private static string RecordingOf(SessionSheet sheet) =>
        sheet.Stream.File is { } file
            ? sheet.PathOf(file)
            : throw new RefusedException("no recording to play", $"{sheet.File}, [stream]", "give --from FILE, or 'file' in the sheet");

    private static string FolderName(SessionSheet sheet, string sessionId, bool isGiven, DateTimeOffset now)
    {
        if (!isGiven) return Path.Combine(sheet.Record.Folder, sessionId);   // made of name and time already
        return Path.Combine(sheet.Record.Folder, $"{sessionId}-{now.ToString("yyyyMMdd-HHmmss", CultureInfo.InvariantCulture)}");
    }
}
