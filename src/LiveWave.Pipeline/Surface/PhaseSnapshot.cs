using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The phasors of one band of one patch at its newest frame, for whoever looks: overwritten, never queued.</summary>
/// <remarks>One writer, the decision thread, which neither waits nor allocates; any number of readers on other threads. Two
/// copies: a reader copies the newer and asks afterwards whether the writer had come round to it meanwhile. Nothing flows back:
/// a run decides the same with and without.</remarks>
public sealed class PhaseSnapshot
{
    // A reader that was overtaken looks again: two frames passed meanwhile, so its thread was off the processor.
    private const int MostLooks = 8;

    private readonly Phasors[] _copies;
    private long _begun;
    private long _written;

    /// <summary>Makes an empty snapshot.</summary>
    /// <param name="channelCount">Channels of the patch, at least 1.</param>
    public PhaseSnapshot(int channelCount) => _copies = [new Phasors(channelCount), new Phasors(channelCount)];

    /// <summary>Frames written so far.</summary>
    public long Written => Volatile.Read(ref _written);

    /// <summary>Writer: a frame.</summary>
    /// <param name="now">Copied, but for the variances; as many channels as the snapshot has.</param>
    public void Write(Phasors now)
    {
        ArgumentNullException.ThrowIfNull(now);
        var number = _written + 1;
        Volatile.Write(ref _begun, number);
        Volatile.WriteBarrier();               // readers learn that this copy is no longer whole before it changes
        Copy(now, _copies[number & 1]);
        Volatile.Write(ref _written, number);  // publishes the copy
    }

    /// <summary>Reader: the newest frame, whole.</summary>
    /// <param name="into">Filled, but for the variances; as many channels as the snapshot has. Its content counts only after true.</param>
    /// <param name="number">Which frame it is, counted from 1.</param>
    /// <returns>False if there is none yet, or the writer overtook every attempt.</returns>
    public bool TryRead(Phasors into, out long number)
    {
        ArgumentNullException.ThrowIfNull(into);
        for (var look = 0; look < MostLooks; look++)
        {
            number = Volatile.Read(ref _written);
            if (number == 0) return false;
            Copy(_copies[number & 1], into);
            Volatile.ReadBarrier();            // the copy is complete before the question
            if (Volatile.Read(ref _begun) < number + 2) return true;
        }

        number = 0;
        return false;
    }

    private static void Copy(Phasors from, Phasors to)
    {
        to.At = from.At;
        from.Re.CopyTo(to.Re);
        from.Im.CopyTo(to.Im);
        from.Validity.CopyTo(to.Validity);
    }
}
