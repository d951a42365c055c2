namespace LiveWave.Pipeline.Tests;

public sealed class GateArmingTests
{
    [Fact]
    public void An_arming_never_overtakes_a_disarming_that_came_after_it_was_examined()
    {
        var tally = new PulseTally(limits: null, allowedLatenessSeconds: 0.001, startSeconds: 0);
        var arming = new GateArming(tally);
        var examined = arming.Current;

        _ = arming.Disarm("the external stop was pressed");   // though it was disarmed already

        Assert.False(arming.TryChange(examined, new GateStanding(GateState.Armed, "", tally)));
        Assert.Equal((GateState.Disarmed, "the external stop was pressed"), (arming.Current.State, arming.Current.Reason));
    }
}
