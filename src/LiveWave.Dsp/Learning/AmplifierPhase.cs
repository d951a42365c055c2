using LiveWave.Abstractions;

namespace LiveWave.Dsp;

/// <summary>
/// The phase that an amplifier adds between the electrode and the recording: its analog filters, its polarity, a delay that the stamps don't
/// hold. Phase at the electrode = phase recorded − this. Immutable.
/// </summary>
/// <remarks>
/// Butterworth stages in closed form: order n, x = corner/f for the high-pass (positive: the recording is early) and f/corner for the low-pass
/// (negative): atan x for odd n, and atan2(2·sin((2k − 1)π/2n)·x, 1 − x²) for k = 1 … n/2. A digital filter inside the amplifier has another
/// phase near its own Nyquist frequency: up to 1° at a fiftieth of its rate. The same for all channels, so directions don't depend on it.
/// </remarks>
public sealed class AmplifierPhase
{
    private const int HighestOrder = 16;
    private const double DegreesPerRadian = 180 / Math.PI;

    /// <summary>Corner (−3 dB) of its high-pass, Hz, above 0; NaN: none.</summary>
    public double HighPassHz { get; init => field = Corner(nameof(HighPassHz), value); } = double.NaN;

    /// <summary>Order of the high-pass, 1 to 16.</summary>
    public int HighPassOrder { get; init => field = Order(nameof(HighPassOrder), value); } = 1;

    /// <summary>Corner (−3 dB) of its low-pass, Hz, above 0; NaN: none.</summary>
    public double LowPassHz { get; init => field = Corner(nameof(LowPassHz), value); } = double.NaN;

    /// <summary>Order of the low-pass, 1 to 16.</summary>
    public int LowPassOrder { get; init => field = Order(nameof(LowPassOrder), value); } = 1;

    /// <summary>From the electrode to the stamp, as far as the stamps don't hold it, seconds. Count it here or as a longer horizon, never twice.</summary>
    public double DelaySeconds { get; init; }

    /// <summary>Positive at the electrode is negative in the recording.</summary>
    public bool IsInverted { get; init; }

    /// <summary>What is added at a frequency, degrees, not wrapped: positive where the recording is early.</summary>
    /// <param name="frequencyHz">Above 0.</param>
    public double DegreesAt(double frequencyHz)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(frequencyHz);
        var radians = 0.0;
        if (!double.IsNaN(HighPassHz)) radians += Turn(HighPassOrder, HighPassHz / frequencyHz);
        if (!double.IsNaN(LowPassHz)) radians -= Turn(LowPassOrder, frequencyHz / LowPassHz);
        return (DegreesPerRadian * radians) - (360 * frequencyHz * DelaySeconds) + (IsInverted ? 180 : 0);
    }

    private static double Turn(int order, double x)
    {
        var turn = order % 2 == 1 ? Portable.Atan2(x, 1) : 0;
        for (var k = 1; k <= order / 2; k++)
        {
            var damping = Portable.Sin(Math.PI * ((2 * k) - 1) / (2.0 * order));
            turn += Portable.Atan2(2 * damping * x, (1 - x) * (1 + x));
        }

        return turn;
    }

    private static double Corner(string name, double cornerHz)
    {
        if (double.IsNaN(cornerHz) || (double.IsFinite(cornerHz) && cornerHz > 0)) return cornerHz;
        throw new RefusedException(
            DesignLimits.Text($"{name} {cornerHz} is not a finite number above 0 Hz"), "", "take the corner from the amplifier's data sheet");
    }

    private static int Order(string name, int order)
    {
        if (order is >= 1 and <= HighestOrder) return order;
        throw new RefusedException(
            DesignLimits.Text($"{name} {order} is not 1 to {HighestOrder}"), "", "take the order from the amplifier's data sheet");
    }
}
