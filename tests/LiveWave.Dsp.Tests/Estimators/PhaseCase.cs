using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>One model of <c>Golden/phase-models.json</c> with what it settles to.</summary>
/// <remarks>Made by <c>tools/golden/phase_vectors.py</c> (numpy 1.24.2, SciPy 1.10.1) from the reference of the phase study.</remarks>
internal sealed record PhaseCase(
    string Name, string Kind, double RateHz, double LowHz, double HighHz, int[] HorizonSamples, OscillatorTerm[] Oscillators,
    BackgroundTerm[] Background, double WhiteVariance, double[] Gain, double InnovationVariance, double[] FilteredDiagonal,
    double[] PredictedDiagonal, double[] VariancePerAxis)
{
    private static readonly JsonSerializerOptions Camel = new(JsonSerializerDefaults.Web);

    internal PhaseModel Model => new(RateHz, Oscillators, Background, WhiteVariance);

    internal Band Band => new(Name, LowHz, HighHz, HorizonSamples);

    internal static PhaseCase Of(string name, string kind) => All().Single(one => one.Name == name && one.Kind == kind);

    internal static IReadOnlyList<PhaseCase> All()
    {
        using var file = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "phase-models.json")));
        return file.RootElement.GetProperty("models").Deserialize<PhaseCase[]>(Camel)!;
    }
}
