using System.Text.Json;
using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

public class AmplifierPhaseTests
{
    /// <summary>Golden/amplifier.json: SciPy 1.10.1, tools/golden/amplifier_phase.py.</summary>
    [Fact]
    public void Is_the_reference_s()
    {
        using var file = JsonDocument.Parse(File.ReadAllText(Path.Combine(AppContext.BaseDirectory, "Golden", "amplifier.json")));
        var cases = file.RootElement.GetProperty("cases").EnumerateArray().ToArray();
        Assert.Equal(12, cases.Length);
        foreach (var golden in cases)
        {
            var (highPassHz, highPassOrder) = Stage(golden.GetProperty("high_pass"));
            var (lowPassHz, lowPassOrder) = Stage(golden.GetProperty("low_pass"));
            var amplifier = new AmplifierPhase
            {
                HighPassHz = highPassHz,
                HighPassOrder = highPassOrder,
                LowPassHz = lowPassHz,
                LowPassOrder = lowPassOrder,
                DelaySeconds = golden.GetProperty("delay_seconds").GetDouble(),
                IsInverted = golden.GetProperty("is_inverted").GetBoolean(),
            };

            Assert.Equal(golden.GetProperty("degrees").GetDouble(), amplifier.DegreesAt(golden.GetProperty("frequency_hz").GetDouble()), 1e-6);
        }
    }

    [Fact]
    public void A_digital_filter_of_a_high_rate_turns_as_much()
    {
        var (re, im) = ButterworthDesign.LowPass(4, 100, 100_000).ResponseAt(20);
        var amplifier = new AmplifierPhase { LowPassHz = 100, LowPassOrder = 4 };

        Assert.Equal(Math.Atan2(im, re) * 180 / Math.PI, amplifier.DegreesAt(20), 1e-3);
    }

    [Fact]
    public void An_amplifier_of_which_nothing_is_said_adds_nothing() => Assert.Equal(0, new AmplifierPhase().DegreesAt(10));

    [Fact]
    public void What_makes_no_sense_is_refused()
    {
        Assert.Equal(
            "HighPassHz 0 is not a finite number above 0 Hz", Assert.Throws<RefusedException>(() => new AmplifierPhase { HighPassHz = 0 }).What);
        Assert.Equal("LowPassOrder 17 is not 1 to 16", Assert.Throws<RefusedException>(() => new AmplifierPhase { LowPassOrder = 17 }).What);
        Assert.Throws<ArgumentOutOfRangeException>(() => new AmplifierPhase().DegreesAt(0));
    }

    private static (double CornerHz, int Order) Stage(JsonElement stage) =>
        stage.ValueKind == JsonValueKind.Null ? (double.NaN, 1) : (stage[0].GetDouble(), stage[1].GetInt32());
}
