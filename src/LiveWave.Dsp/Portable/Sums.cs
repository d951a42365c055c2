using System.Runtime.Intrinsics;

namespace LiveWave.Dsp;

/// <summary>
/// Sums over channels in one written order, the same bits at every vector width: element i is added to lane i mod 8, then the
/// lanes as ((0+4) + (2+6)) + ((1+5) + (3+7)).
/// </summary>
/// <remarks>Nothing allocates. NaN in any element gives NaN; an empty sum is 0. Where lanes are 128 bits wide, two halves are used: same bits.</remarks>
public static class Sums
{
    private const int Lanes = 8;
    private const int Half = Lanes / 2;

    /// <summary>Σ a[i].</summary>
    /// <param name="a">Any length.</param>
    public static double Sum(ReadOnlySpan<double> a)
    {
        var low = Vector256<double>.Zero;
        var high = Vector256<double>.Zero;
        var i = 0;
        for (; i <= a.Length - Lanes; i += Lanes)
        {
            low += Vector256.Create(a.Slice(i, Half));
            high += Vector256.Create(a.Slice(i + Half, Half));
        }

        Span<double> lane = stackalloc double[Lanes];
        low.CopyTo(lane);
        high.CopyTo(lane[Half..]);
        for (; i < a.Length; i++) lane[i % Lanes] += a[i];
        return Fold(lane);
    }

    /// <summary>Σ a[i]·b[i].</summary>
    /// <param name="a">Any length.</param>
    /// <param name="b">As long as <paramref name="a"/>.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        RefuseUnequal(a.Length, b.Length);
        var low = Vector256<double>.Zero;
        var high = Vector256<double>.Zero;
        var i = 0;
        for (; i <= a.Length - Lanes; i += Lanes)
        {
            low += Vector256.Create(a.Slice(i, Half)) * Vector256.Create(b.Slice(i, Half));
            high += Vector256.Create(a.Slice(i + Half, Half)) * Vector256.Create(b.Slice(i + Half, Half));
        }

        Span<double> lane = stackalloc double[Lanes];
        low.CopyTo(lane);
        high.CopyTo(lane[Half..]);
        for (; i < a.Length; i++) lane[i % Lanes] += a[i] * b[i];
        return Fold(lane);
    }

    /// <summary>Σ (w[i]·a[i])·b[i]: a weighted product.</summary>
    /// <param name="w">Weights, any length.</param>
    /// <param name="a">As long as <paramref name="w"/>.</param>
    /// <param name="b">As long as <paramref name="w"/>.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static double Dot3(ReadOnlySpan<double> w, ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        RefuseUnequal(w.Length, a.Length);
        RefuseUnequal(w.Length, b.Length);
        var low = Vector256<double>.Zero;
        var high = Vector256<double>.Zero;
        var i = 0;
        for (; i <= w.Length - Lanes; i += Lanes)
        {
            low += Vector256.Create(w.Slice(i, Half)) * Vector256.Create(a.Slice(i, Half)) * Vector256.Create(b.Slice(i, Half));
            var j = i + Half;
            high += Vector256.Create(w.Slice(j, Half)) * Vector256.Create(a.Slice(j, Half)) * Vector256.Create(b.Slice(j, Half));
        }

        Span<double> lane = stackalloc double[Lanes];
        low.CopyTo(lane);
        high.CopyTo(lane[Half..]);
        for (; i < w.Length; i++) lane[i % Lanes] += w[i] * a[i] * b[i];
        return Fold(lane);
    }

    private static double Fold(ReadOnlySpan<double> lane) =>
        ((lane[0] + lane[4]) + (lane[2] + lane[6])) + ((lane[1] + lane[5]) + (lane[3] + lane[7]));

    private static void RefuseUnequal(int length, int other)
    {
        if (length != other) throw new ArgumentException($"a sum of products needs equal lengths, got {length} and {other}");
    }
}
