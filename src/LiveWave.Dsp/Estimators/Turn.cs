using System.Runtime.Intrinsics;

namespace LiveWave.Dsp;

/// <summary>A complex number that phasors are multiplied by: a rotation, with a gain where its modulus is not 1.</summary>
/// <param name="Re">Real part.</param>
/// <param name="Im">Imaginary part.</param>
internal readonly record struct Turn(double Re, double Im)
{
    /// <summary>One turn after the other.</summary>
    public static Turn operator *(Turn a, Turn b) => new((a.Re * b.Re) - (a.Im * b.Im), (a.Re * b.Im) + (a.Im * b.Re));

    /// <summary>Turns phasors.</summary>
    /// <param name="ofRe">Real parts to turn. All four rows padded, of one length.</param>
    /// <param name="ofIm">Imaginary parts to turn.</param>
    /// <param name="re">Filled.</param>
    /// <param name="im">Filled.</param>
    internal void Apply(ReadOnlySpan<double> ofRe, ReadOnlySpan<double> ofIm, Span<double> re, Span<double> im)
    {
        var valueRe = Lanes.Of(ofRe);
        var valueIm = Lanes.Of(ofIm);
        var turnedRe = Lanes.Of(re);
        var turnedIm = Lanes.Of(im);
        var turnRe = Vector256.Create(Re);
        var turnIm = Vector256.Create(Im);
        for (var i = 0; i < turnedRe.Length; i++)
        {
            turnedRe[i] = (turnRe * valueRe[i]) - (turnIm * valueIm[i]);
            turnedIm[i] = (turnRe * valueIm[i]) + (turnIm * valueRe[i]);
        }
    }

    /// <summary>Adds turned phasors to others.</summary>
    /// <param name="ofRe">Real parts to turn. All four rows padded, of one length.</param>
    /// <param name="ofIm">Imaginary parts to turn.</param>
    /// <param name="re">Added to.</param>
    /// <param name="im">Added to.</param>
    internal void AddTo(ReadOnlySpan<double> ofRe, ReadOnlySpan<double> ofIm, Span<double> re, Span<double> im)
    {
        var valueRe = Lanes.Of(ofRe);
        var valueIm = Lanes.Of(ofIm);
        var sumRe = Lanes.Of(re);
        var sumIm = Lanes.Of(im);
        var turnRe = Vector256.Create(Re);
        var turnIm = Vector256.Create(Im);
        for (var i = 0; i < sumRe.Length; i++)
        {
            sumRe[i] += (turnRe * valueRe[i]) - (turnIm * valueIm[i]);
            sumIm[i] += (turnRe * valueIm[i]) + (turnIm * valueRe[i]);
        }
    }
}
