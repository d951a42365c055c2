namespace LiveWave.Pipeline.Tests;

/// <summary>The key table itself: whoever adds a row keeps these.</summary>
public sealed class SheetKeysTests
{
    private static readonly Dictionary<string, string> Endings = new(StringComparer.Ordinal)
    {
        ["ms"] = "Ms",
        ["Hz"] = "Hz",
        ["degrees"] = "Degrees",
        ["mm"] = "Mm",
        ["minutes"] = "Minutes",
        ["m/s"] = "MetresPerSecond",
        ["microseconds"] = "Microseconds",
        ["microvolts"] = "Microvolts",
    };

    public static TheoryData<string> Paths => [.. SheetKeys.All.Select(key => key.Path)];

    [Theory]
    [MemberData(nameof(Paths))]
    public void Every_key_stands_in_a_table_that_is_a_row_above_it(string path)
    {
        var key = SheetKeys.Find(path)!;
        var paths = SheetKeys.All.Select(k => k.Path).ToList();

        Assert.Single(paths, path);
        if (key.TablePath.Length == 0)
        {
            Assert.True(key.IsTable);
            return;
        }

        Assert.True(SheetKeys.Find(key.TablePath)?.IsTable);
        Assert.InRange(paths.IndexOf(key.TablePath), 0, paths.IndexOf(path) - 1);
    }

    [Theory]
    [MemberData(nameof(Paths))]
    public void A_number_s_key_ends_in_its_unit(string path)
    {
        var key = SheetKeys.Find(path)!;
        if (key.Type == SheetKeyType.NamedNumbers) return;

        var unit = Endings.Where(pair => key.Name.EndsWith(pair.Value, StringComparison.Ordinal)).Select(pair => pair.Key).SingleOrDefault("");

        Assert.Equal(key.Unit, unit);
    }

    [Theory]
    [MemberData(nameof(Paths))]
    public void A_meaning_is_one_sentence_without_its_full_stop(string path)
    {
        var meaning = SheetKeys.Find(path)!.Meaning;

        Assert.Matches("^[A-Z]", meaning);
        Assert.DoesNotMatch(@"(\. |\.$)", meaning);
    }

    [Theory]
    [MemberData(nameof(Paths))]
    public void A_built_key_says_what_happens_without_it(string path)
    {
        var key = SheetKeys.Find(path)!;
        if (!key.IsBuilt) return;

        Assert.True(key.IsRequired ^ (key.Default is not null || key.Otherwise.Length > 0));
    }

    [Theory]
    [MemberData(nameof(Paths))]
    public void The_model_has_a_place_for_a_built_key(string path)
    {
        if (!SheetKeys.Find(path)!.IsBuilt) return;
        Assert.True(SheetForm.TryRead(SheetSketch.Full().Parsed(), "sheet.toml", out var sheet, out _));

        _ = SheetModel.Value(sheet, path);
    }

    [Fact]
    public void The_model_has_nothing_that_the_key_table_lacks()
    {
        var known = SheetKeys.All.GroupBy(key => key.TablePath).ToDictionary(g => g.Key, g => g.Select(SheetModel.Property).ToHashSet());
        (string Table, Type Model, string[] Beside)[] models =
        [
            ("", typeof(SessionSheet), ["File", "CalibrationBeside"]), ("session", typeof(SessionTable), []),
            ("stream", typeof(StreamTable), []), ("amplifier", typeof(AmplifierTable), []), ("cue", typeof(CueTable), []),
            ("patch", typeof(PatchTable), []), ("conditioning", typeof(ConditioningTable), []), ("band", typeof(BandTable), []),
            ("band.phase", typeof(PhaseTable), []), ("band.wave", typeof(WaveTable), []), ("band.wave.event", typeof(EventTable), []),
            ("rule", typeof(RuleTable), ["HasDirection"]), ("part", typeof(PartTable), []), ("limits", typeof(LimitsTable), []),
            ("output", typeof(OutputTable), ["Where"]), ("budget", typeof(BudgetTable), []), ("record", typeof(RecordTable), []),
        ];

        Assert.Equal(known.Keys.Order(StringComparer.Ordinal), models.Select(m => m.Table).Order(StringComparer.Ordinal));
        Assert.All(models, m => Assert.Empty(m.Model.GetProperties().Select(p => p.Name).Except(known[m.Table]).Except(m.Beside)));
    }
}
