namespace LiveWave.Dsp;

/// <summary>Background of a whole scene, hum included, row by row; and its power in the scene's band.</summary>
internal sealed class SceneNoise
{
    private readonly Scene _scene;
    private readonly PatchNoise[] _patches;
    private readonly FirstOrderNoise? _common;

    public SceneNoise(Scene scene)
    {
        _scene = scene;
        var bank = BankOf(scene);
        _patches = [.. scene.Patches.Select(patch => new PatchNoise(scene, patch, bank))];
        if (scene.Background.CommonMicrovolts > 0) _common = new FirstOrderNoise(bank, 1, new SceneLots(scene.Seed, "common"));
    }

    /// <summary>Root mean square of the modulus of the background's analytic signal in the band, mean power over channels, before gains;
    /// without hum. 0 without a band or background.</summary>
    public static double BandMicrovolts(Scene scene)
    {
        var (low, high, rate) = (scene.BandLowHz, scene.BandHighHz, scene.RateHz);
        if (double.IsNaN(low)) return 0;
        var background = scene.Background;
        var coloured = Square(background.LocalMicrovolts) + Square(background.CommonMicrovolts) + Square(background.ContactMicrovolts);
        var variance = Square(background.SensorMicrovolts) * BandShare.White(low, high, rate);
        if (coloured > 0) variance += coloured * BandShare.Of(BankOf(scene), low, high);
        if (scene.Rhythm is { } rhythm)
        {
            var pole = Oscillator.PoleOf(rhythm.WidthHz, rate);
            variance += Square(rhythm.Microvolts) * BandShare.Oscillator(pole, rhythm.FrequencyHz, low, high, rate);
        }

        return Math.Sqrt(2 * variance);
    }

    /// <summary>Writes the next row. Does not allocate.</summary>
    /// <param name="number">The row's number.</param>
    /// <param name="row">All channels.</param>
    public void Next(long number, Span<double> row)
    {
        var common = _common is null ? 0 : _scene.Background.CommonMicrovolts * _common.Next()[0];
        if (_scene.HumMicrovolts > 0) common += _scene.HumMicrovolts * Portable.Sin(2 * Math.PI * _scene.MainsHz * number / _scene.RateHz);
        row.Fill(common);
        var first = 0;
        for (var i = 0; i < _patches.Length; i++)
        {
            var count = _scene.Patches[i].Layout.Electrodes.Count;
            _patches[i].AddNext(row.Slice(first, count));
            first += count;
        }
    }

    private static FirstOrderBank BankOf(Scene scene) => new(scene.Background.Exponent, scene.Background.CornerHz, scene.RateHz);

    private static double Square(double value) => value * value;
}
