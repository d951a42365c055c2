namespace LiveWave.Abstractions.Tests;

public sealed class PluginOptionsTests
{
    [Fact]
    public void A_key_that_nobody_asked_for_is_refused_with_what_is_allowed()
    {
        var options = Options(("lenghtMs", 3.0));
        _ = options.Number("lengthMs", 5);

        var refused = Assert.Throws<RefusedException>(options.RefuseUnknown);

        Assert.Equal("rig.sheet.toml:7, output 'x': unknown key 'lenghtMs'; allowed: lengthMs", refused.Message);
    }

    [Fact]
    public void A_number_outside_its_limits_or_of_another_type_is_refused()
    {
        var options = Options(("lengthMs", 50.0), ("invert", "yes"));

        Assert.Throws<RefusedException>(() => options.Number("lengthMs", 5, 0, 20));
        Assert.Throws<RefusedException>(() => options.Flag("invert", false));
    }

    [Fact]
    public void What_the_sheet_does_not_say_has_its_default()
    {
        var options = Options();

        Assert.Equal(5, options.Number("lengthMs", 5));
        Assert.Equal("rising", options.Text("edge", "rising"));
        Assert.True(options.Flag("invert", true));
        options.RefuseUnknown();
    }

    private static PluginOptions Options(params (string Key, object Value)[] values) =>
        new("rig.sheet.toml:7, output 'x'", values.ToDictionary(pair => pair.Key, pair => pair.Value), new StillClock());

    private sealed class StillClock : IClock
    {
        public double NowSeconds => 0;

        public void WaitUntil(double instantSeconds)
        {
        }
    }
}
