using System.Runtime.Intrinsics;

namespace LiveWave.Dsp;

/// <summary>Takes channels that are missing from a frame out of all products with the inverse covariance Q.</summary>
/// <remarks>
/// A missing channel is replaced by its mean given the others, jointly z_M = −Q_MM⁻¹ Q_MO z_O. That equals using
/// Q − Q_:M Q_MM⁻¹ Q_M: in place of Q: every product, for the frame and for templates alike, is then that of an array without these
/// channels, whatever stands in their places. Bounded work; no allocation.
/// </remarks>
internal sealed class MissingChannels
{
    private readonly Whitening _whitening;
    private readonly int[] _channels;
    private readonly double[] _factor;
    private readonly double[] _re;
    private readonly double[] _im;

    /// <summary>None missing.</summary>
    /// <param name="whitening">The inverse covariance.</param>
    /// <param name="most">Most channels that may be missing.</param>
    public MissingChannels(Whitening whitening, int most)
    {
        _whitening = whitening;
        _channels = new int[most];
        _factor = new double[most * most];
        _re = new double[most];
        _im = new double[most];
    }

    /// <summary>Number of missing channels.</summary>
    public int Count { get; private set; }

    /// <summary>Grows with every change of the set: whoever keeps something that depends on it looks here.</summary>
    public int Version { get; private set; }

    /// <summary>Sets which channels are missing; quick if they are the same as before.</summary>
    /// <param name="isMissing">One a good channel.</param>
    /// <param name="count">How many are, at most the number given at first.</param>
    public void Set(ReadOnlySpan<bool> isMissing, int count)
    {
        if (count == Count && IsSame(isMissing)) return;
        Count = 0;
        for (var i = 0; i < isMissing.Length; i++)
        {
            if (isMissing[i]) _channels[Count++] = i;
        }

        for (var row = 0; row < Count; row++)
        {
            var inverse = _whitening.Row(_channels[row]);
            for (var column = 0; column < Count; column++) _factor[row * Count + column] = inverse[_channels[column]];
        }

        // A principal block of a positive definite matrix is positive definite.
        _ = Cholesky.TryFactor(_factor, Count);
        Version++;
    }

    /// <summary>Corrects a product of Q with a complex vector in place.</summary>
    /// <param name="re">Real parts.</param>
    /// <param name="im">Imaginary parts.</param>
    public void Correct(Span<double> re, Span<double> im)
    {
        if (Count == 0) return;
        for (var m = 0; m < Count; m++) (_re[m], _im[m]) = (re[_channels[m]], im[_channels[m]]);
        Solve(_re);
        Solve(_im);
        for (var m = 0; m < Count; m++)
        {
            var row = _whitening.Row(_channels[m]);
            Subtract(row, _re[m], re);
            Subtract(row, _im[m], im);
        }

        for (var m = 0; m < Count; m++) re[_channels[m]] = im[_channels[m]] = 0;
    }

    /// <summary>By how much v′Qv shrinks for a real vector v.</summary>
    /// <param name="product">Qv, uncorrected, over all good channels.</param>
    public double Reduction(ReadOnlySpan<double> product)
    {
        var gathered = _re.AsSpan(0, Count);
        for (var m = 0; m < Count; m++) gathered[m] = product[_channels[m]];
        Cholesky.Forward(_factor, Count, gathered);
        return Sums.Dot(gathered, gathered);
    }

    private static void Subtract(ReadOnlySpan<double> row, double times, Span<double> from)
    {
        var i = 0;
        for (; i <= row.Length - 4; i += 4)
        {
            var part = from.Slice(i, 4);
            (Vector256.Create<double>(part) - Vector256.Create(row.Slice(i, 4)) * Vector256.Create(times)).CopyTo(part);
        }

        for (; i < row.Length; i++) from[i] -= row[i] * times;
    }

    private void Solve(Span<double> v)
    {
        Cholesky.Forward(_factor, Count, v);
        Cholesky.Backward(_factor, Count, v);
    }

    private bool IsSame(ReadOnlySpan<bool> isMissing)
    {
        for (var m = 0; m < Count; m++)
        {
            if (!isMissing[_channels[m]]) return false;
        }

        return true;
    }
}
