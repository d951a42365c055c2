using LiveWave.Abstractions;

namespace LiveWave.Dsp.Tests;

/// <summary>Arrays and frames for tests of wave estimators, and the reading of the last of some frames.</summary>
internal static class WaveFrames
{
    public const double RateHz = 1000;

    public static readonly Band Alpha = new("alpha", 8, 12, []);

    public static Layout Grid(int columns, int rows, double pitchMm = 0.4, double rotationDegrees = 0) => new(
        [.. Enumerable.Range(0, columns * rows)
            .Select(i => new Electrode($"r{i / columns}c{i % columns}", i % columns * pitchMm, i / columns * pitchMm))],
        rotationDegrees);

    public static Layout Line(int count, double pitchMm, double degrees, double rotationDegrees = 0) => new(
        [.. Enumerable.Range(0, count).Select(i => new Electrode(
            $"c{i}", i * pitchMm * Math.Cos(degrees * Math.PI / 180), i * pitchMm * Math.Sin(degrees * Math.PI / 180)))],
        rotationDegrees);

    public static StreamFormat Format(Layout layout, double rateHz = RateHz) => new(
        "array", rateHz, WireFormat.Float32, [.. layout.Electrodes.Select(electrode => new ChannelFormat(electrode.Channel, "microvolts"))]);

    // phase(x, y) in radians; noise per axis.
    public static Phasors Frame(
        Layout layout, Func<double, double, double> phase, double noise = 0, Func<double, double, double>? amplitude = null, long index = 0, ulong seed = 1)
    {
        var lots = new Testing.SplitMix64(seed);
        var phasors = new Phasors(layout.Electrodes.Count) { At = new RowInstant(index, index, index / RateHz) };
        for (var i = 0; i < layout.Electrodes.Count; i++)
        {
            var (x, y) = (layout.Electrodes[i].XMm, layout.Electrodes[i].YMm);
            var (modulus, angle) = (amplitude?.Invoke(x, y) ?? 1, phase(x, y));
            phasors.Re[i] = modulus * Math.Cos(angle) + noise * lots.NextNormal();
            phasors.Im[i] = modulus * Math.Sin(angle) + noise * lots.NextNormal();
        }

        phasors.Validity.Fill(Validity.Observed);
        return phasors;
    }

    public static Func<double, double, double> Plane(double wavelengthMm, double degrees, double phase = 0)
    {
        var (kx, ky) = (Math.Cos(degrees * Math.PI / 180), Math.Sin(degrees * Math.PI / 180));
        return (x, y) => phase - 2 * Math.PI / wavelengthMm * (kx * x + ky * y);
    }

    public static Reading Read(Layout layout, Calibration calibration, PlanarOptions options, params Phasors[] frames)
    {
        var estimator = new PlanarEstimator(options);
        _ = estimator.Prepare(Format(layout), Alpha, layout, calibration);
        var reading = new Reading();
        foreach (var frame in frames) estimator.Read(frame, ref reading);
        return reading;
    }

    public static Reading Read(Layout layout, params Phasors[] frames) =>
        Read(layout, Calibration.None("array", "alpha"), new PlanarOptions(), frames);
}
