namespace LiveWave.Abstractions;

/// <summary>Zero-lag spatial covariance of the ordinary activity in a band.</summary>
public sealed class NoiseModel
{
    /// <summary>Describes the noise.</summary>
    /// <param name="covariance">Row-major, real, symmetric, over the good channels in channel order, of phasors divided by
    /// <see cref="Calibration.ChannelRms"/>.</param>
    /// <param name="loading">Share of the mean variance added to the diagonal before inversion.</param>
    /// <param name="form">How it was made: <c>fitted</c> (a smooth model) or <c>empirical</c>.</param>
    /// <param name="misfit">Root mean square deviation of the model over pairs, in units of the variance; NaN if not known.</param>
    /// <exception cref="ArgumentException">The matrix is not square or holds something that is not a number.</exception>
    public NoiseModel(IReadOnlyList<double> covariance, double loading, string form, double misfit)
    {
        ArgumentNullException.ThrowIfNull(covariance);
        var n = 0;
        while (n * n < covariance.Count) n++;
        if (n * n != covariance.Count || n == 0) throw new ArgumentException("the covariance is not square", nameof(covariance));
        if (covariance.Any(value => !double.IsFinite(value)))
        {
            throw new ArgumentException("the covariance holds something that is not a number", nameof(covariance));
        }

        ChannelCount = n;
        Covariance = [.. covariance];
        Loading = loading;
        Form = form;
        Misfit = misfit;
    }

    /// <summary>Number of good channels.</summary>
    public int ChannelCount { get; }

    /// <summary>Row-major, <see cref="ChannelCount"/> squared values.</summary>
    public IReadOnlyList<double> Covariance { get; }

    /// <summary>Share of the mean variance added to the diagonal before inversion.</summary>
    public double Loading { get; }

    /// <summary><c>fitted</c> or <c>empirical</c>.</summary>
    public string Form { get; }

    /// <summary>Root mean square deviation of the model over pairs, in units of the variance; NaN if not known.</summary>
    public double Misfit { get; }
}
