using System.Globalization;
using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Which bits this machine computes: a hash over the chain's results on a built-in scene.</summary>
/// <remarks>Two machines with the same print take the same decisions from the same recording; an audit on another machine says
/// whether it may compare bit for bit. FNV-1a, 64 bit, over the bits of every phasor and reading.</remarks>
public static class NumericsPrint
{
    private const double RateHz = 500;
    private const int Rows = 1000;
    private const int Columns = 5;
    private const int Channels = 20;
    private const double PitchMm = 0.4;
    private const ulong Offset = 0xCBF29CE484222325;
    private const ulong Prime = 0x100000001B3;

    /// <summary>Computes it: some milliseconds.</summary>
    /// <returns>Sixteen hexadecimal digits.</returns>
    public static string Compute()
    {
        var format = new StreamFormat(
            "scene", RateHz, WireFormat.Float64, [.. Enumerable.Range(0, Channels).Select(i => new ChannelFormat($"e{i}", "microvolts"))]);
        var layout = new Layout(
            [.. Enumerable.Range(0, Channels).Select(i => new Electrode($"e{i}", PitchMm * (i % Columns), PitchMm * (i / Columns)))], 30);
        var band = new Band("scene", 14, 22, []);
        var calibration = new Calibration { Patch = "scene", Band = "scene", PhaseModel = Model(), ChannelScale = Ones(), ChannelRms = Ones() };
        var phase = new OscillatorEstimator();
        var waves = new PlanarEstimator();
        phase.Prepare(format, band, calibration);
        var samplesPerFrame = waves.Prepare(format, band, layout, calibration);
        var notch = new MainsNotch(50);
        _ = notch.Prepare(format);
        return Play(phase, waves, notch, samplesPerFrame);
    }

    private static string Play(OscillatorEstimator phase, PlanarEstimator waves, MainsNotch notch, int samplesPerFrame)
    {
        var row = new double[Channels];
        var conditioned = new double[Channels];
        var now = new Phasors(Channels);
        var reading = new Reading();
        var hash = Offset;
        for (var n = 0; n < Rows; n++)
        {
            Fill(row, n);
            now.At = new RowInstant(n, n, n / RateHz);
            _ = notch.Step(row, conditioned);
            phase.Step(conditioned, now);
            foreach (var value in now.Re) hash = Add(hash, value);
            foreach (var value in now.Im) hash = Add(hash, value);
            if (n % samplesPerFrame != 0) continue;
            waves.Read(now, ref reading);
            foreach (var value in Values(reading)) hash = Add(hash, value);
        }

        return hash.ToString("x16", CultureInfo.InvariantCulture);
    }

    private static double[] Values(in Reading reading) =>
    [
        reading.Statistic, reading.DirectionDegrees, reading.DirectionStandardErrorDegrees, reading.WaveVectorX, reading.WaveVectorY,
        reading.GainOverUniform, reading.GainOutOfPhase, reading.LocalFrequencyHz, reading.SlownessLow, reading.SlownessMiddle,
    ];

    // A wave that turns slowly over the array, on noise from lots: it passes every branch of the estimators.
    private static void Fill(double[] row, int n)
    {
        var (sine, cosine) = Portable.SinCos(0.002 * n);
        for (var i = 0; i < Channels; i++)
        {
            var lag = 1.6 * PitchMm * (((i % Columns) * cosine) + ((i / Columns) * sine));
            var noise = KeyedLot.Draw(1, "scene", "noise", ((long)n * Channels) + i) - 0.5;
            row[i] = (3 * Portable.Cos((2 * Math.PI * 18 * n / RateHz) - lag)) + noise;
        }
    }

    private static PhaseModel Model()
    {
        var (sine, cosine) = Portable.SinCos(2 * Math.PI * 18 / RateHz);
        const double Radius = 0.98;
        return new PhaseModel(
            RateHz, [new OscillatorTerm(Radius * cosine, Radius * sine, 0.02, IsTarget: true)], [new BackgroundTerm(0.9, 0.05)], 0.1);
    }

    private static double[] Ones() => [.. Enumerable.Repeat(1.0, Channels)];

    // Every NaN counts as the same one: its bits carry no number.
    private static ulong Add(ulong hash, double value)
    {
        var bits = double.IsNaN(value) ? ulong.MaxValue : BitConverter.DoubleToUInt64Bits(value);
        for (var shift = 0; shift < 64; shift += 8) hash = (hash ^ ((bits >> shift) & 0xFF)) * Prime;
        return hash;
    }
}
