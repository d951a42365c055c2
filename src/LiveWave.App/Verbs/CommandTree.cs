using System.CommandLine;
using LiveWave.Pipeline;

namespace LiveWave.App;

/// <summary>The verbs and their options.</summary>
internal static class CommandTree
{
    private const string DemoSessionId = "millrace-demo";

    public static RootCommand Build(Func<WatchOptions, int> watch, Func<SynthOptions, int> synth, bool isTerminal = false)
    {
        var root = new RootCommand(
            "LiveWave watches travelling waves on electrode arrays while they pass, decides by rule, and rehearses pulses. "
            + "For research; not a medical device. Exit codes: 0 done, 1 the answer is no, 2 the request or its input was wrong, "
            + "3 the machine or rig failed.");
        root.Subcommands.Add(Demo(watch, isTerminal));
        root.Subcommands.Add(Watch(watch, isTerminal));
        root.Subcommands.Add(Synth(synth));
        return root;
    }

    private static Command Demo(Func<WatchOptions, int> watch, bool isTerminal)
    {
        var common = new CommonOptions(isTerminal);
        var command = new Command("demo", "Plays the bundled recording: waves, decisions, rehearsed pulses, comparison with the truth. No hardware, no network.");
        common.AddTo(command);
        command.SetAction(parsed => watch(common.Read(parsed, "demo", BundledSheet(), from: null) with
        {
            SessionId = parsed.GetValue(common.SessionId) ?? DemoSessionId,
        }));
        return command;
    }

    private static Command Watch(Func<WatchOptions, int> watch, bool isTerminal)
    {
        var common = new CommonOptions(isTerminal);
        var sheet = new Argument<string?>("SHEET") { Description = "The session sheet, a TOML file.", Arity = ArgumentArity.ZeroOrOne };
        var keys = new Option<bool>("--keys") { Description = "Print every key of a sheet with its unit, default and range, and end." };
        var from = new Option<string?>("--from") { Description = "A recording to play; the sheet's own [stream] file if not given.", HelpName = "FILE" };
        var command = new Command("watch", "Looks, decides and rehearses; can never arm. Keys of the sheet: watch --keys.") { sheet, from, keys };
        common.AddTo(command);
        command.Validators.Add(result =>
        {
            if (!result.GetValue(keys) && result.GetValue(sheet) is null) result.AddError("give the SHEET to watch with");
        });
        command.SetAction(parsed => parsed.GetValue(keys) ? PrintKeys(SheetKeys.Lookup) : watch(common.Read(parsed, "watch", parsed.GetValue(sheet)!, parsed.GetValue(from))));
        return command;
    }

    private static Command Synth(Func<SynthOptions, int> synth)
    {
        var scene = new Argument<string?>("SCENE") { Description = "The scene, a TOML file.", Arity = ArgumentArity.ZeroOrOne };
        var keys = new Option<bool>("--keys") { Description = "Print every key of a scene with its unit, default and range, and end." };
        var file = new Option<string?>("--out") { Description = "The recording to make (XDF); never overwritten.", HelpName = "FILE" };
        var json = new Option<bool>("--json") { Description = "Print the summary as JSON." };
        var command = new Command("synth", "Makes a recording with known truth from a scene. Keys of the scene: synth --keys.") { scene, file, keys, json };
        command.Validators.Add(result =>
        {
            if (result.GetValue(keys)) return;
            if (result.GetValue(scene) is null) result.AddError("give the SCENE to make");
            if (string.IsNullOrEmpty(result.GetValue(file))) result.AddError("give --out FILE, the recording to make");
        });
        command.SetAction(parsed => parsed.GetValue(keys)
            ? PrintKeys(SceneKeys.Lookup)
            : synth(new SynthOptions(parsed.GetValue(scene)!, parsed.GetValue(file)!, parsed.GetValue(json))));
        return command;
    }

    private static int PrintKeys(KeyTable keys)
    {
        Console.Out.Write(SheetReference.Text(keys));
        return ExitCode.Done;
    }

    private static string BundledSheet() => Path.Combine(AppContext.BaseDirectory, "replay-data", "millrace.sheet.toml");
}
