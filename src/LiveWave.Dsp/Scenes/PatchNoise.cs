namespace LiveWave.Dsp;

/// <summary>Background of one patch: local field and contacts as one mixed bank, white sensors, the ongoing rhythm.</summary>
internal sealed class PatchNoise
{
    private const double Ridge = 1e-9;
    private const double FieldRidge = 1e-6;

    private readonly double[] _mixing;
    private readonly FirstOrderNoise? _coloured;
    private readonly SceneLots _sensors;
    private readonly double _sensorMicrovolts;
    private readonly Oscillator? _rhythm;
    private readonly double[] _field;

    public PatchNoise(Scene scene, ScenePatch patch, FirstOrderBank bank)
    {
        var (background, geometry) = (scene.Background, new PatchGeometry(patch.Layout));
        _sensors = new SceneLots(scene.Seed, "sensor", patch.Name);
        _sensorMicrovolts = background.SensorMicrovolts;
        _mixing = Mixing(background, geometry);
        _coloured = _mixing.Length == 0 ? null : new FirstOrderNoise(bank, geometry.Count, new SceneLots(scene.Seed, "field", patch.Name));
        _field = scene.Rhythm is { } rhythm ? Field(rhythm, geometry, new SceneLots(scene.Rig.Seed ?? scene.Seed, "rhythm field", patch.Name)) : [];
        _rhythm = scene.Rhythm is { } line
            ? new Oscillator(line.FrequencyHz, line.WidthHz, scene.RateHz, new SceneLots(scene.Seed, "rhythm", patch.Name))
            : null;
    }

    /// <summary>Adds the next row. Does not allocate.</summary>
    /// <param name="row">The patch's channels.</param>
    public void AddNext(Span<double> row)
    {
        if (_coloured is not null)
        {
            var noises = _coloured.Next();
            for (var i = 0; i < row.Length; i++) row[i] += Sums.Dot(_mixing.AsSpan(i * row.Length, i + 1), noises[..(i + 1)]);
        }

        if (_sensorMicrovolts > 0)
        {
            for (var i = 0; i < row.Length; i++) row[i] += _sensorMicrovolts * _sensors.Normal();
        }

        if (_rhythm is null) return;
        var value = _rhythm.Next();
        for (var i = 0; i < row.Length; i++) row[i] += _field[i] * value;
    }

    private static double[] Mixing(SceneBackground background, PatchGeometry geometry)
    {
        var local = background.LocalMicrovolts * background.LocalMicrovolts;
        var contact = background.ContactMicrovolts * background.ContactMicrovolts;
        if (local + contact == 0) return [];
        var lengthMm = double.IsNaN(background.LocalLengthMm) ? 0.5 * geometry.ApertureMm : background.LocalLengthMm;
        return geometry.Factor(
            distance => distance == 0 ? local : local * Portable.Exp(-distance / lengthMm), contact + (Ridge * local));
    }

    /// <summary>Smooth and positive, root mean square times the rhythm's microvolts.</summary>
    private static double[] Field(SceneRhythm rhythm, PatchGeometry geometry, SceneLots lots)
    {
        var lengthMm = double.IsNaN(rhythm.FieldLengthMm) ? 0.6 * geometry.ApertureMm : rhythm.FieldLengthMm;
        var factor = geometry.Factor(
            distance => distance == 0 ? 1 : Portable.Exp(-0.5 * distance / lengthMm * distance / lengthMm), FieldRidge);
        var normals = new double[geometry.Count];
        for (var i = 0; i < normals.Length; i++) normals[i] = lots.Normal();
        var field = new double[geometry.Count];
        for (var i = 0; i < field.Length; i++)
        {
            field[i] = Portable.Exp(rhythm.FieldLogSd * Sums.Dot(factor.AsSpan(i * field.Length, i + 1), normals.AsSpan(0, i + 1)));
        }

        var scale = rhythm.Microvolts / Math.Sqrt(Sums.Dot(field, field) / field.Length);
        for (var i = 0; i < field.Length; i++) field[i] *= scale;
        return field;
    }
}
