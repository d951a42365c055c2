using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>Delays and amplitudes of the sites for each kind of event.</summary>
internal static class SitePattern
{
    /// <summary>Delay of each site, mean 0. A wave travels towards larger delays.</summary>
    public static double[] DelaysSeconds(SceneTruth truth, PatchGeometry geometry)
    {
        var delays = new double[geometry.Count];
        var mmPerSecond = 1000 * truth.SpeedMetresPerSecond;
        for (var i = 0; i < delays.Length; i++)
        {
            var (x, y) = (geometry.XMm[i], geometry.YMm[i]);
            var (dx, dy) = (x - truth.CentreXMm, y - truth.CentreYMm);
            delays[i] = truth.Event.Kind switch
            {
                WaveKind.Planar => Along(truth.DirectionDegrees, x, y) / mmPerSecond,
                WaveKind.Expanding => Portable.Hypot(dx, dy) / mmPerSecond,
                WaveKind.Contracting => -Portable.Hypot(dx, dy) / mmPerSecond,
                WaveKind.RotatingCounterClockwise => Portable.Atan2(dy, dx) / (2 * Math.PI * truth.FrequencyHz),
                WaveKind.RotatingClockwise => -Portable.Atan2(dy, dx) / (2 * Math.PI * truth.FrequencyHz),
                _ => 0,
            };
        }

        var mean = Sums.Sum(delays) / delays.Length;
        for (var i = 0; i < delays.Length; i++) delays[i] -= mean;
        return delays;
    }

    /// <summary>Amplitude of each site, root mean square 1.</summary>
    /// <exception cref="RefusedException">The shape is 0 at every site.</exception>
    public static double[] Amplitudes(SceneTruth truth, PatchGeometry geometry)
    {
        var amplitudes = new double[geometry.Count];
        for (var i = 0; i < amplitudes.Length; i++)
        {
            var (dx, dy) = (geometry.XMm[i] - truth.CentreXMm, geometry.YMm[i] - truth.CentreYMm);
            amplitudes[i] = truth.Event.Kind switch
            {
                WaveKind.Standing => Portable.Cos(2 * Math.PI * Along(truth.DirectionDegrees, dx, dy) / truth.WavelengthMm),
                WaveKind.InPhase => Shape(truth, dx / geometry.ApertureMm, dy / geometry.ApertureMm),
                _ => 1,
            };
        }

        var rms = Math.Sqrt(Sums.Dot(amplitudes, amplitudes) / amplitudes.Length);
        if (!(rms > 1e-6))
        {
            throw new RefusedException("an event has no amplitude at any site", truth.Event.Patch, "move its centre onto the array");
        }

        for (var i = 0; i < amplitudes.Length; i++) amplitudes[i] /= rms;
        return amplitudes;
    }

    /// <summary>A shape at a place given in apertures from the centre.</summary>
    private static double Shape(SceneTruth truth, double dx, double dy)
    {
        if (truth.Event.Shape == SceneShape.Focus) return Bump(dx, dy, 0.35);
        var (sine, cosine) = Portable.SinCos(truth.DirectionDegrees * Math.PI / 180);
        return truth.Event.Shape switch
        {
            SceneShape.EdgeFocus => Bump(dx - (0.5 * cosine), dy - (0.5 * sine), 0.5),
            SceneShape.Ramp => 0.6 + (0.8 * ((dx * cosine) + (dy * sine))),
            _ => Bump(dx - (0.4 * cosine), dy - (0.4 * sine), 0.35) - Bump(dx + (0.4 * cosine), dy + (0.4 * sine), 0.35),
        };
    }

    private static double Bump(double dx, double dy, double width) => Portable.Exp(-0.5 * ((dx * dx) + (dy * dy)) / (width * width));

    private static double Along(double degrees, double x, double y)
    {
        var (sine, cosine) = Portable.SinCos(degrees * Math.PI / 180);
        return (cosine * x) + (sine * y);
    }
}
