namespace LiveWave.Dsp.Tests;

public class KeyedLotTests
{
    [Fact]
    public void Lots_of_a_hundred_thousand_onsets_are_uniform()
    {
        const int Draws = 100_000;
        const int Boxes = 100;
        var counts = new int[Boxes];
        for (var onset = 0L; onset < Draws; onset++) counts[(int)(KeyedLot.Draw(7, "millrace-01", "travelling", onset) * Boxes)]++;

        var chiSquare = counts.Sum(count => (count - (Draws / Boxes)) * (double)(count - (Draws / Boxes))) / (Draws / Boxes);

        Assert.InRange(chiSquare, 61.1, 148.2);      // 0.1 % to 99.9 % of chi-square with 99 degrees of freedom
    }

    [Fact]
    public void Lots_of_neighbouring_onsets_know_nothing_of_each_other()
    {
        const int Draws = 100_000;
        var sum = 0.0;
        for (var onset = 0L; onset < Draws; onset++)
        {
            sum += (KeyedLot.Draw(7, "s", "r", onset) - 0.5) * (KeyedLot.Draw(7, "s", "r", onset + 1) - 0.5);
        }

        Assert.InRange(sum / Draws * 12 * Math.Sqrt(Draws), -3.3, 3.3);      // a standard normal if independent
    }

    [Theory]
    [InlineData(0UL, "", "", 0L, 0.9144741194650587)]
    [InlineData(1UL, "millrace-01", "towards-135", 12_345L, 0.44335380109864364)]
    [InlineData(1UL, "millrace-01", "towards-135", 12_346L, 0.9850196727171878)]
    [InlineData(ulong.MaxValue, "Größe", "règle", -1L, 0.9231871733243666)]
    public void Known_keys_have_known_lots(ulong seed, string sessionId, string rule, long onset, double lot) =>
        Assert.Equal(lot, KeyedLot.Draw(seed, sessionId, rule, onset));

    [Fact]
    public void Each_part_of_the_key_counts()
    {
        double[] lots =
        [
            KeyedLot.Draw(1, "ab", "c", 5), KeyedLot.Draw(2, "ab", "c", 5), KeyedLot.Draw(1, "a", "bc", 5),
            KeyedLot.Draw(1, "c", "ab", 5), KeyedLot.Draw(1, "ab", "d", 5), KeyedLot.Draw(1, "ab", "c", 6),
        ];

        Assert.Equal(lots.Length, lots.Distinct().Count());
    }

    [Fact]
    public void Renaming_one_rule_leaves_the_other_rules_lots_as_they_were()
    {
        var before = Sheet("leading");
        var after = Sheet("trailing");

        Assert.NotEqual(before.First, after.First);
        Assert.Equal(before.Second, after.Second);

        static (double First, double Second) Sheet(string firstRule) =>
            (KeyedLot.Draw(3, "s", firstRule, 400), KeyedLot.Draw(3, "s", "other", 400));
    }
}
