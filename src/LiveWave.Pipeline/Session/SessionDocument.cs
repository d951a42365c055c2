using System.Reflection;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace LiveWave.Pipeline;

/// <summary><c>session.json</c>: what ran, on what kind of machine, with which seed. Nothing that names a person or a machine.</summary>
public sealed record SessionDocument
{
    private static readonly JsonSerializerOptions Indented = new() { WriteIndented = true, Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>The sheet's name for the session.</summary>
    public required string Name { get; init; }

    /// <summary>The session's own name, which keys its lots.</summary>
    public required string SessionId { get; init; }

    /// <summary>The seed.</summary>
    public required ulong Seed { get; init; }

    /// <summary>When it began.</summary>
    public required DateTimeOffset Began { get; init; }

    /// <summary><c>real</c> or <c>fast</c>.</summary>
    public required string Clock { get; init; }

    /// <summary>Most rows in a block.</summary>
    public required int BlockRows { get; init; }

    /// <summary>How instants are waited for, and what that lacks.</summary>
    public required string Waiting { get; init; }

    /// <summary>Which bits this machine computes.</summary>
    public required string NumericsPrint { get; init; }

    /// <summary>The file that was played, without its folder.</summary>
    public required string Recording { get; init; }

    /// <summary>What is not built in; empty so far.</summary>
    public IReadOnlyList<(string Name, string Sha256)> Plugins { get; init; } = [];

    /// <summary>Writes the file.</summary>
    /// <param name="folder">Where.</param>
    public void Write(SessionFolder folder)
    {
        ArgumentNullException.ThrowIfNull(folder);
        var plugins = new JsonArray();
        foreach (var (name, hash) in Plugins) plugins.Add(new JsonObject { ["name"] = name, ["sha256"] = hash });
        var root = new JsonObject
        {
            ["format"] = "livewave-session",
            ["version"] = 1,
            ["name"] = Name,
            ["sessionId"] = SessionId,
            ["seed"] = Seed,
            ["began"] = Began.ToString("yyyy-MM-dd'T'HH:mm:sszzz", System.Globalization.CultureInfo.InvariantCulture),
            ["recording"] = Recording,
            ["clock"] = Clock,
            ["blockRows"] = BlockRows,
            ["waiting"] = Waiting,
            ["numericsPrint"] = NumericsPrint,
            ["program"] = ProgramVersion(),
            ["runtime"] = RuntimeInformation.FrameworkDescription,
            ["system"] = RuntimeInformation.OSDescription,
            ["architecture"] = RuntimeInformation.ProcessArchitecture.ToString(),
            ["processors"] = Environment.ProcessorCount,
            ["vectorBits"] = VectorBits(),
            ["serverGarbageCollector"] = System.Runtime.GCSettings.IsServerGC,
            ["plugins"] = plugins,
        };
        File.WriteAllText(folder.At("session.json"), root.ToJsonString(Indented) + "\n");
    }

    private static string ProgramVersion() =>
        typeof(SessionDocument).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "unknown";

    private static int VectorBits()
    {
        if (Vector512.IsHardwareAccelerated) return 512;
        if (Vector256.IsHardwareAccelerated) return 256;
        return Vector128.IsHardwareAccelerated ? 128 : 64;
    }
}
