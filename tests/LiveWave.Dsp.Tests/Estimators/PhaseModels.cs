using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Hand-made phase models and calibrations.</summary>
internal static class PhaseModels
{
    /// <summary>One target at 10 Hz, 1.5 Hz wide, over a background of two processes; 1000 Hz.</summary>
    internal static PhaseModel Alpha { get; } = new(1000, [Oscillator(10, 1.5, 1, true)], [Background(0.5, 1), Background(32, 0.5)], 0.05);

    /// <summary>A target and a neighbour that is none, over the five processes of a fit.</summary>
    internal static PhaseModel Full { get; } = new(
        1000,
        [Oscillator(10, 1.5, 1, true), Oscillator(14, 1.5, 0.5, false)],
        [Background(0.5, 0.5), Background(2, 0.5), Background(8, 0.3), Background(32, 0.3), Background(128, 0.1)],
        0.05);

    /// <summary>A calibration around a model.</summary>
    internal static Calibration Calibration(PhaseModel? model, params double[] scales) =>
        new() { Patch = "A", Band = "alpha", PhaseModel = model, ChannelScale = scales };

    private static OscillatorTerm Oscillator(double centreHz, double widthHz, double variance, bool isTarget)
    {
        var modulus = Math.Exp(-Math.PI * widthHz / 1000);
        var angle = 2 * Math.PI * centreHz / 1000;
        return new(modulus * Math.Cos(angle), modulus * Math.Sin(angle), variance * (1 - (modulus * modulus)), isTarget);
    }

    private static BackgroundTerm Background(double cornerHz, double variance)
    {
        var pole = Math.Exp(-2 * Math.PI * cornerHz / 1000);
        return new(pole, variance * (1 - (pole * pole)));
    }
}
