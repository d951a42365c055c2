namespace LiveWave.Dsp.Tests;

/// <summary>Against SciPy 1.10.1 (butter, cheby2, ellip, iirnotch, sosfilt, sosfilt_zi), Golden/filters.json.</summary>
public class FilterGoldenTests
{
    [Fact]
    public void There_is_something_to_compare() => Assert.InRange(GoldenFilter.All().Count, 50, 80);

    [Fact]
    public void Responses_are_the_reference_s()
    {
        foreach (var golden in GoldenFilter.All())
        {
            var design = golden.Design();
            for (var i = 0; i < golden.ProbeHz.Length; i++)
            {
                var (re, im) = design.ResponseAt(golden.ProbeHz[i]);

                var (wantedRe, wantedIm) = (golden.Response[i][0], golden.Response[i][1]);
                var error = Portable.Hypot(re - wantedRe, im - wantedIm) / Portable.Hypot(wantedRe, wantedIm);
                Assert.True(error <= golden.Tolerance, $"{golden} at {golden.ProbeHz[i]} Hz: relative error {error:e1}");
            }
        }
    }

    [Fact]
    public void Group_delays_are_the_reference_s()
    {
        foreach (var golden in GoldenFilter.All())
        {
            var design = golden.Design();
            var longest = golden.GroupDelaySeconds.Max(Math.Abs);
            for (var i = 0; i < golden.ProbeHz.Length; i++)
            {
                var error = Math.Abs(design.GroupDelaySeconds(golden.ProbeHz[i]) - golden.GroupDelaySeconds[i]) / longest;

                Assert.True(error <= golden.Tolerance, $"{golden} at {golden.ProbeHz[i]} Hz: relative error {error:e1}");
            }
        }
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Outputs_are_the_reference_s(bool isSettled)
    {
        var input = GoldenFilter.Input();
        foreach (var golden in GoldenFilter.All())
        {
            var filter = new SectionFilter(golden.Design(), 1);
            var wanted = isSettled ? golden.Settled : golden.FromRest;
            var largest = wanted.Max(Math.Abs);
            if (isSettled) filter.Settle([input[0]]);

            var output = new double[1];
            for (var i = 0; i < input.Length; i++)
            {
                filter.Step([input[i]], output);
                if (i % GoldenFilter.Every != 0) continue;

                var error = Math.Abs(output[0] - wanted[i / GoldenFilter.Every]) / largest;
                Assert.True(error <= golden.Tolerance, $"{golden}, sample {i}: relative error {error:e1}");
            }
        }
    }
}
