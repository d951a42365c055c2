using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>From the events that a scene asks for to those that happen.</summary>
internal static class TruthDraw
{
    private const double TenthOfBel = 0.23025850929940457;    // ln 10 / 10

    /// <summary>All events, in order of their onsets.</summary>
    /// <param name="scene">The scene.</param>
    /// <param name="bandMicrovolts">From <see cref="SceneNoise.BandMicrovolts"/>.</param>
    /// <exception cref="RefusedException">An SNR is asked for and nothing lies in the band.</exception>
    public static IReadOnlyList<SceneTruth> Of(Scene scene, double bandMicrovolts)
    {
        var all = new List<SceneTruth>();
        for (var i = 0; i < scene.Events.Count; i++)
        {
            var asked = scene.Events[i];
            if (!double.IsNaN(asked.SnrDecibels) && bandMicrovolts == 0)
            {
                throw new RefusedException(
                    "an event has an SNR, and the scene no background in a band", scene.Name, "give a [band] and a background, or amplitudeMicrovolts");
            }

            if (double.IsNaN(asked.SnrDecibels) && double.IsNaN(asked.AmplitudeMicrovolts))
            {
                throw new RefusedException("an event has neither SNR nor amplitude", scene.Name, "give it one of the two");
            }

            var patch = scene.Patches.FirstOrDefault(candidate => candidate.Name == asked.Patch)
                ?? throw new RefusedException($"there is no patch '{asked.Patch}'", scene.Name, "name one of the scene's");
            var geometry = new PatchGeometry(patch.Layout);
            for (var repeat = 0; repeat < asked.Repeats; repeat++)
            {
                var lots = new SceneLots(scene.Seed, "event", asked.Patch, (i * 1_000_000L) + repeat);
                all.Add(One(asked, repeat, geometry, bandMicrovolts, lots));
            }
        }

        return [.. all.OrderBy(truth => truth.OnsetSeconds)];
    }

    /// <summary>Draws one. Every lot is drawn whether it is used or not, so that one spread does not move another's lots.</summary>
    private static SceneTruth One(SceneEvent asked, int repeat, PatchGeometry geometry, double bandMicrovolts, SceneLots lots)
    {
        var (moved, turned, louder, higher, phase) =
            (lots.Spread(asked.EverySpreadSeconds), lots.Spread(asked.DirectionSpreadDegrees), lots.Spread(asked.SnrSpreadDecibels),
            lots.Spread(asked.FrequencySpreadHz), 2 * Math.PI * lots.Uniform());
        var onset = asked.OnsetSeconds + (repeat == 0 ? 0 : repeat * asked.EverySeconds);
        var frequency = Rounded(asked.FrequencyHz + higher, 100, asked.FrequencySpreadHz);
        var direction = Rounded(asked.DirectionDegrees + turned, 10, asked.DirectionSpreadDegrees);
        var snr = Rounded(asked.SnrDecibels + louder, 10, asked.SnrSpreadDecibels);
        var amplitude = double.IsNaN(snr)
            ? asked.AmplitudeMicrovolts * Portable.Exp(0.5 * TenthOfBel * louder)
            : bandMicrovolts * Portable.Exp(0.5 * TenthOfBel * snr);
        var isRadial = asked.Kind is WaveKind.Planar or WaveKind.Expanding or WaveKind.Contracting;
        var wavelength = isRadial || asked.Kind == WaveKind.Standing
            ? double.IsNaN(asked.WavelengthMm) ? 1000 * asked.SpeedMetresPerSecond / frequency : asked.WavelengthMm
            : double.NaN;
        var hasCentre = asked.Kind is not (WaveKind.Planar or WaveKind.Synchronous);
        return new SceneTruth
        {
            Event = asked,
            OnsetSeconds = Math.Max(0, Rounded(onset + moved, 1000, asked.EverySpreadSeconds)),
            FrequencyHz = frequency,
            PhaseRadians = double.IsNaN(asked.PhaseDegrees) ? phase : asked.PhaseDegrees * Math.PI / 180,
            DirectionDegrees = UsesDirection(asked) ? direction - (360 * Math.Floor(direction / 360)) : double.NaN,
            WavelengthMm = wavelength,
            WavelengthApertures = wavelength / geometry.ApertureMm,
            SpeedMetresPerSecond = isRadial ? frequency * wavelength / 1000 : double.NaN,
            CentreXMm = !hasCentre ? double.NaN : double.IsNaN(asked.CentreXMm) ? geometry.MeanXMm : asked.CentreXMm,
            CentreYMm = !hasCentre ? double.NaN : double.IsNaN(asked.CentreYMm) ? geometry.MeanYMm : asked.CentreYMm,
            SnrDecibels = double.IsNaN(snr) && bandMicrovolts > 0 ? Portable.Log(amplitude / bandMicrovolts) / (0.5 * TenthOfBel) : snr,
            AmplitudeMicrovolts = amplitude,
        };
    }

    private static bool UsesDirection(SceneEvent asked) =>
        asked.Kind is WaveKind.Planar or WaveKind.Standing || (asked.Kind == WaveKind.InPhase && asked.Shape != SceneShape.Focus);

    private static double Rounded(double value, double steps, double spread) => spread > 0 ? Math.Round(value * steps) / steps : value;
}
