namespace LiveWave.Dsp;

/// <summary>A 1/f spectrum as a sum of independent first-order processes, one an octave (van der Ziel 1950): poles and shares of variance.</summary>
/// <remarks>The shares are fitted so that at every corner the power is (f² + corner²)^(−exponent / 2); between them it is off by
/// at most 0.25 dB up to a quarter of the rate, 1.3 dB up to 0.4 of it. Immutable.</remarks>
internal sealed class FirstOrderBank
{
    private const int Rounds = 60;

    /// <summary>Fits a bank.</summary>
    /// <param name="exponent">0.5 to 1.8.</param>
    /// <param name="cornerHz">Above 0, below a quarter of the rate.</param>
    /// <param name="rateHz">Sampling rate.</param>
    public FirstOrderBank(double exponent, double cornerHz, double rateHz)
    {
        RateHz = rateHz;
        var corners = new List<double>();
        for (var corner = cornerHz; corner < 0.5 * rateHz; corner *= 2) corners.Add(corner);
        Poles = [.. corners.Select(corner => Portable.Exp(-2 * Math.PI * corner / rateHz))];
        Shares = new double[Poles.Length];
        Array.Fill(Shares, 1.0);
        var wanted = corners.ConvertAll(
            corner => Portable.Exp(-0.5 * exponent * Portable.Log((corner * corner) + (cornerHz * cornerHz))));
        var ratios = new double[Poles.Length];
        for (var round = 0; round < Rounds; round++)
        {
            for (var i = 0; i < ratios.Length; i++) ratios[i] = wanted[i] / Power(corners[i]);
            for (var i = 0; i < ratios.Length; i++) Shares[i] *= ratios[i];
        }

        var sum = Sums.Sum(Shares);
        for (var i = 0; i < Shares.Length; i++) Shares[i] /= sum;
    }

    /// <summary>Sampling rate.</summary>
    public double RateHz { get; }

    /// <summary>Poles, slowest first.</summary>
    public double[] Poles { get; }

    /// <summary>Shares of the variance; their sum is 1.</summary>
    public double[] Shares { get; }

    /// <summary>Power at a frequency, against white noise of the same variance.</summary>
    /// <param name="frequencyHz">0 to half the rate.</param>
    public double Power(double frequencyHz)
    {
        var cosine = Portable.Cos(2 * Math.PI * frequencyHz / RateHz);
        var power = 0.0;
        for (var i = 0; i < Poles.Length; i++)
        {
            var pole = Poles[i];
            power += Shares[i] * (1 - (pole * pole)) / (1 - (2 * pole * cosine) + (pole * pole));
        }

        return power;
    }
}
