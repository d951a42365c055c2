namespace LiveWave.Pipeline.Tests;

/// <summary>Guessing what was meant.</summary>
public sealed class SpellingTests
{
    [Theory]
    [InlineData("directionDegree", "directionDegrees")]
    [InlineData("DIRECTIONDEGREES", "directionDegrees")]
    [InlineData("direction", "directionDegrees")]
    [InlineData("driectionDegrees", "directionDegrees")]
    [InlineData("restSeconds", null)]
    [InlineData("restms", "restMs")]
    [InlineData("colour", null)]
    [InlineData("", null)]
    public void The_nearest_word_is_found_if_one_is_near(string written, string? expected)
    {
        Assert.Equal(expected, Spelling.Nearest(written, ["directionDegrees", "restMs", "leadMs"]));
    }

    [Fact]
    public void Endless_words_are_not_compared()
    {
        Assert.Null(Spelling.Nearest(new string('x', 1_000_000), ["leadMs"]));
    }
}
