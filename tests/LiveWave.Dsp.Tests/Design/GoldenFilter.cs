using System.Text.Json;
using LiveWave.Testing;

namespace LiveWave.Dsp.Tests;

/// <summary>One entry of Golden/filters.json (SciPy 1.10.1; generator tools/golden/filter_vectors.py).</summary>
internal sealed record GoldenFilter(
    string Kind, int Order, double[] EdgesHz, double? Quality, double RateHz, double[] ProbeHz, double[][] Response,
    double[] GroupDelaySeconds, double[] FromRest, double[] Settled, string Family = "butterworth",
    double? RippleDb = null, double? AttenuationDb = null)
{
    public const int Every = 10;
    private const int Samples = 400;
    private const ulong Seed = 99;

    private static readonly JsonSerializerOptions Names = new() { PropertyNamingPolicy = JsonNamingPolicy.SnakeCaseLower };

    /// <summary>The input that the generator filtered.</summary>
    public static double[] Input()
    {
        var normals = new SplitMix64(Seed);
        return [.. Enumerable.Range(0, Samples).Select(_ => normals.NextNormal())];
    }

    public static IReadOnlyList<GoldenFilter> All()
    {
        using var file = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "filters.json")));
        return [.. file.RootElement.GetProperty("designs").EnumerateArray().Select(entry => entry.Deserialize<GoldenFilter>(Names)!)];
    }

    /// <summary>Relative error allowed: double coefficients of a band below a thousandth of the rate hold no more digits.</summary>
    public double Tolerance => EdgesHz[^1] < RateHz / 1000 ? 1e-6 : 1e-9;

    public SecondOrderSections Design() => (Family, Kind) switch
    {
        ("butterworth", "band-pass") => ButterworthDesign.BandPass(Order, EdgesHz[0], EdgesHz[1], RateHz),
        ("butterworth", "band-stop") => ButterworthDesign.BandStop(Order, EdgesHz[0], EdgesHz[1], RateHz),
        ("butterworth", "low-pass") => ButterworthDesign.LowPass(Order, EdgesHz[0], RateHz),
        ("butterworth", "high-pass") => ButterworthDesign.HighPass(Order, EdgesHz[0], RateHz),
        ("butterworth", "notch") => NotchDesign.Notch(EdgesHz[0], Quality!.Value, RateHz),
        ("chebyshev-ii", "band-pass") => ChebyshevTwoDesign.BandPass(Order, AttenuationDb!.Value, EdgesHz[0], EdgesHz[1], RateHz),
        ("chebyshev-ii", "band-stop") => ChebyshevTwoDesign.BandStop(Order, AttenuationDb!.Value, EdgesHz[0], EdgesHz[1], RateHz),
        ("chebyshev-ii", "low-pass") => ChebyshevTwoDesign.LowPass(Order, AttenuationDb!.Value, EdgesHz[0], RateHz),
        ("chebyshev-ii", "high-pass") => ChebyshevTwoDesign.HighPass(Order, AttenuationDb!.Value, EdgesHz[0], RateHz),
        ("elliptic", "band-pass") => EllipticDesign.BandPass(Order, RippleDb!.Value, AttenuationDb!.Value, EdgesHz[0], EdgesHz[1], RateHz),
        ("elliptic", "band-stop") => EllipticDesign.BandStop(Order, RippleDb!.Value, AttenuationDb!.Value, EdgesHz[0], EdgesHz[1], RateHz),
        ("elliptic", "low-pass") => EllipticDesign.LowPass(Order, RippleDb!.Value, AttenuationDb!.Value, EdgesHz[0], RateHz),
        _ => throw new InvalidOperationException($"{Family} {Kind}"),
    };

    public override string ToString() => $"{Family} {Kind} {string.Join("-", EdgesHz)} Hz, order {Order}, {RateHz} Hz";
}
