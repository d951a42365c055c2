using System.Globalization;

namespace LiveWave.Benchmarks;

/// <summary>What the machine's processors did meanwhile, from <c>/proc/stat</c> (proc(5)): busy, idle, stolen by the host.</summary>
internal static class HostLoad
{
    private const int Idle = 3;
    private const int Steal = 7;

    public static long[] Now()
    {
        if (!File.Exists("/proc/stat")) return [];
        var words = File.ReadLines("/proc/stat").First().Split(' ', StringSplitOptions.RemoveEmptyEntries);
        return [.. words.Skip(1).Select(word => long.Parse(word, CultureInfo.InvariantCulture))];
    }

    public static string Since(long[] before)
    {
        var now = Now();
        if (before.Length <= Steal || now.Length <= Steal) return "load of the machine not known";
        var spent = now.Zip(before, (a, b) => a - b).ToArray();
        var all = Math.Max(1, spent.Take(Steal + 1).Sum());
        return $"{Environment.ProcessorCount} processors, {100.0 * (all - spent[Idle]) / all:F0} % busy, {100.0 * spent[Steal] / all:F1} % stolen by the host";
    }
}
