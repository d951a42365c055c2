using LiveWave.Abstractions;

namespace LiveWave.Pipeline.Tests;

/// <summary>Checking and reading, key by key over the whole table.</summary>
public sealed class SheetFormTests
{
    private const string File = "folder/test.sheet.toml";

    public static TheoryData<string> Built => [.. SheetKeys.All.Where(key => key.IsBuilt).Select(key => key.Path)];

    public static TheoryData<string> BuiltValues => [.. SheetKeys.All.Where(key => key.IsBuilt && !key.IsTable).Select(key => key.Path)];

    public static TheoryData<string> Required => [.. SheetKeys.All.Where(key => key.IsBuilt && key.IsRequired).Select(key => key.Path)];

    public static TheoryData<string> NotYet => [.. SheetKeys.All.Where(IsFirstNotYet).Select(key => key.Path)];

    public static TheoryData<string> Numbers =>
        [.. SheetKeys.All.Where(key => key.IsBuilt && key.Type is SheetKeyType.Number or SheetKeyType.Whole).Select(key => key.Path)];

    [Theory]
    [MemberData(nameof(BuiltValues))]
    public void Every_key_is_read_into_the_model(string path)
    {
        var key = SheetKeys.Find(path)!;
        var given = SheetSketch.Sample(key);
        if (key.Default is not null) Assert.NotEqual(key.Default, given);

        var sheet = Read(SheetSketch.Full());

        Assert.Equal(AsModelled(given), AsModelled(SheetModel.Value(sheet, path)));
    }

    [Theory]
    [MemberData(nameof(BuiltValues))]
    public void What_the_sheet_leaves_out_has_the_default_of_the_table(string path)
    {
        var key = SheetKeys.Find(path)!;
        if (key.IsRequired || path == "stream.file" || key.TablePath == "limits") return;
        var sketch = SheetSketch.Least();
        foreach (var needed in (string[])["rule", "output"])
        {
            foreach (var other in SheetKeys.Under(needed).Where(k => k.IsRequired)) _ = sketch.With(other.Path, SheetSketch.Sample(other));
        }

        var value = SheetModel.Value(Read(sketch), path);

        if (path == "rule.wave") Assert.Equal("planar", value);
        else if (key.Default is not null) Assert.Equal(AsModelled(key.Default), AsModelled(value));
        else Assert.True(value is null or double.NaN or System.Collections.ICollection { Count: 0 }, $"{value}");
    }

    [Fact]
    public void A_sheet_without_limits_rules_and_outputs_can_be_looked_with()
    {
        var sheet = Read(SheetSketch.Least());

        Assert.Null(sheet.Limits);
        Assert.Empty(sheet.Rules);
        Assert.Empty(sheet.Outputs);
    }

    [Theory]
    [MemberData(nameof(Required))]
    public void A_missing_key_is_named_with_the_line_of_its_table(string path)
    {
        var key = SheetKeys.Find(path)!;
        var sketch = SheetSketch.Full().Without(path);

        var fault = Assert.Single(Faults(sketch), f => f.Key == path);

        Assert.Equal(sketch.LineOf(key.TablePath), fault.Line);
        Assert.Equal("missing", fault.What);
        Assert.Equal("give " + key.Takes, fault.Advice);
    }

    [Theory]
    [MemberData(nameof(Built))]
    public void A_value_of_the_wrong_type_is_refused_with_what_is_allowed(string path)
    {
        var key = SheetKeys.Find(path)!;
        foreach (var wrong in (object?[])[null, "text", 1L, 1.5, true, new object[] { 1L }, new Dictionary<string, object?>()])
        {
            if (Fits(key, wrong)) continue;
            var sketch = SheetSketch.Full().With(path, wrong);

            var faults = Faults(sketch);

            Assert.Contains(faults, f =>
                f.Line == sketch.LineOf(path) && f.Key.StartsWith(path, StringComparison.Ordinal) && f.What.Length > 0 && f.Advice.Length > 0);
        }
    }

    [Theory]
    [MemberData(nameof(Numbers))]
    public void A_number_out_of_range_is_refused_and_the_ends_are_not(string path)
    {
        var key = SheetKeys.Find(path)!;
        var step = key.Type == SheetKeyType.Whole ? 1 : 0.001;
        var wrong = new List<double> { double.NaN, double.PositiveInfinity, double.NegativeInfinity };
        if (key.Words.Count > 0) wrong.Add(51);
        if (double.IsFinite(key.Low)) wrong.Add(key.IsLowExcluded ? key.Low : key.Low - step);
        if (double.IsFinite(key.High)) wrong.Add(key.High + step);

        Assert.All(wrong, number =>
        {
            var fault = Assert.Single(Faults(FullBut(key, number)), f => f.Key == path);
            Assert.Equal("give " + key.Takes, fault.Advice);
        });
        Assert.All(
            new[] { key.IsLowExcluded ? key.Low + step : key.Low, key.High }.Where(double.IsFinite),
            number => Assert.DoesNotContain(Faults(FullBut(key, number)), f => f.Advice == "give " + key.Takes));
    }

    [Theory]
    [MemberData(nameof(Built))]
    public void A_misspelt_key_is_refused_and_the_right_one_suggested(string path)
    {
        var key = SheetKeys.Find(path)!;
        var slip = SheetKeys.Join(key.TablePath, key.Name[..^2] + key.Name[^1] + key.Name[^2]);
        if (SheetKeys.Find(slip) is not null) return;
        var sketch = SheetSketch.Full().With(slip, 1L);

        var fault = Assert.Single(Faults(sketch));

        Assert.Equal((slip, sketch.LineOf(slip), "unknown key"), (fault.Key, fault.Line, fault.What));
        Assert.StartsWith($"did you mean '{key.Name}'? allowed: ", fault.Advice, StringComparison.Ordinal);
        Assert.All(
            SheetKeys.Under(key.TablePath),
            own => Assert.Equal(own.IsBuilt, fault.Advice.Split(": ")[1].Split(", ").Any(a => a.Trim('[', ']') == own.Path || a == own.Name)));
    }

    [Theory]
    [MemberData(nameof(NotYet))]
    public void A_key_that_is_not_built_is_refused_as_not_yet(string path)
    {
        var sketch = SheetSketch.Full().With(path, "something");

        var fault = Assert.Single(Faults(sketch));

        Assert.Equal((path, sketch.LineOf(path), "leave it out"), (fault.Key, fault.Line, fault.Advice));
        Assert.StartsWith("not yet built", fault.What, StringComparison.Ordinal);
    }

    [Fact]
    public void A_word_that_is_not_built_is_refused_as_not_yet()
    {
        var faults = SheetKeys.All.SelectMany(key => key.WordsNotYet.Select(word =>
            Assert.Single(Faults(SheetSketch.Full().With(key.Path, word)), f => f.Key == key.Path).What == $"'{word}' is not yet built"));

        Assert.All(faults, Assert.True);
    }

    [Fact]
    public void A_key_of_another_table_is_sent_home()
    {
        var fault = Assert.Single(Faults(SheetSketch.Full().With("limits.shamFraction", 0.2)));

        Assert.StartsWith("it belongs to [[rule]]; allowed: ", fault.Advice, StringComparison.Ordinal);
    }

    [Fact]
    public void All_faults_are_reported_by_line()
    {
        var sketch = SheetSketch.Full().With("rule.leadMs", -1L).With("session.seed", "x").With("band.lowHz", 30L).Without("patch.electrodes");

        var faults = Faults(sketch);

        Assert.Equal(["session.seed", "patch.electrodes", "band.highHz", "rule.leadMs"], faults.Select(f => f.Key));
        Assert.Equal(faults.Select(f => f.Line).Order(), faults.Select(f => f.Line));
    }

    [Fact]
    public void Paths_and_the_usual_calibration_lie_beside_the_sheet()
    {
        var sheet = Read(SheetSketch.Least());

        Assert.Equal("test.calibration.json", sheet.CalibrationBeside);
        Assert.Equal(Path.Combine("folder", "millrace.xdf"), sheet.PathOf("millrace.xdf"));
        Assert.Equal("other.calibration.json", (sheet with { File = "other.toml" }).CalibrationBeside);
        Assert.Equal("plain.calibration.json", (sheet with { File = "a/plain" }).CalibrationBeside);
    }

    private static SessionSheet Read(SheetSketch sketch)
    {
        var isRead = SheetForm.TryRead(sketch.Parsed(), File, out var sheet, out var faults);

        Assert.True(isRead, string.Join('\n', faults));
        return sheet!;
    }

    private static IReadOnlyList<SheetFault> Faults(SheetSketch sketch)
    {
        _ = SheetForm.TryRead(sketch.Parsed(), File, out var sheet, out var faults);

        Assert.Equal(sheet is null, faults.Count > 0);
        return faults;
    }

    /// <summary>Keys below a table that is not built are never reached.</summary>
    private static bool IsFirstNotYet(SheetKey key) =>
        !key.IsBuilt && (key.TablePath.Length == 0 || SheetKeys.Find(key.TablePath)!.IsBuilt);

    private static SheetSketch FullBut(SheetKey key, double number) => key.Type == SheetKeyType.Whole && double.IsFinite(number)
        ? SheetSketch.Full().With(key.Path, (long)number)
        : SheetSketch.Full().With(key.Path, number);

    private static bool Fits(SheetKey key, object? content) => content switch
    {
        string => key.Type is SheetKeyType.Name or SheetKeyType.Text,
        long => key.Type is SheetKeyType.Number or SheetKeyType.Whole,
        double => key.Type == SheetKeyType.Number,
        bool => key.Type == SheetKeyType.Flag,
        Dictionary<string, object?> => key.Type is SheetKeyType.Table or SheetKeyType.NamedNumbers or SheetKeyType.Options,
        _ => false,
    };

    private static object? AsModelled(object? value) => value switch
    {
        ulong or int or long => Convert.ToDouble(value, System.Globalization.CultureInfo.InvariantCulture),
        WaveKind kind => kind.ToString().ToLowerInvariant(),
        IEnumerable<NamedAxis> axes => axes.Select(axis => $"{axis.Name}={axis.Degrees}").ToArray(),
        IReadOnlyDictionary<string, object> options => options.Select(o => $"{o.Key}={o.Value}").ToArray(),
        IEnumerable<string> texts => texts.ToArray(),
        _ => value,
    };
}
