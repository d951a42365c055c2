namespace LiveWave.App.Tests;

public sealed class LabelMatchTests
{
    [Theory]
    [InlineData("FC5", 0)]
    [InlineData("Fc5.", 0)]
    [InlineData("cz", 1)]
    [InlineData("Cz..", 1)]
    [InlineData("Pz", -1)]
    public void Capitals_and_dots_at_the_end_do_not_count(string label, int place) =>
        Assert.Equal(place, new LabelMatch(["FC5", "CZ"]).Find(label));

    [Fact]
    public void The_same_to_the_letter_goes_first() => Assert.Equal(1, new LabelMatch(["a1", "A1"]).Find("A1"));

    [Fact]
    public void Two_that_are_only_similar_are_none() => Assert.True(new LabelMatch(["a1", "A1"]).Find("A1.") < 0);
}
