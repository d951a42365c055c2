namespace LiveWave.Pipeline;

/// <summary>A bounded hand-off from one thread to one other: neither waits, neither allocates, what did not fit is counted.</summary>
/// <typeparam name="T">Copied in and out.</typeparam>
public sealed class OneProducerRing<T>
{
    private readonly T[] _places;
    private readonly int _mask;
    private long _written;
    private long _read;
    private long _refused;

    /// <summary>Makes a ring.</summary>
    /// <param name="capacity">At least this many places.</param>
    public OneProducerRing(int capacity)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(capacity, 1);
        var size = 1;
        while (size < capacity) size *= 2;
        _places = new T[size];
        _mask = size - 1;
    }

    /// <summary>Values that found no place.</summary>
    public long Refused => Volatile.Read(ref _refused);

    /// <summary>Values waiting.</summary>
    public int Count => (int)(Volatile.Read(ref _written) - Volatile.Read(ref _read));

    /// <summary>Places in all.</summary>
    public int Capacity => _places.Length;

    /// <summary>Writer: offers a value.</summary>
    /// <param name="value">Copied.</param>
    /// <returns>False, and counted, if the ring is full.</returns>
    public bool Offer(in T value)
    {
        if (_written - Volatile.Read(ref _read) == _places.Length)
        {
            Volatile.Write(ref _refused, _refused + 1);
            return false;
        }

        _places[_written & _mask] = value;
        Volatile.Write(ref _written, _written + 1);   // publishes the value written above
        return true;
    }

    /// <summary>Reader: takes the oldest value.</summary>
    /// <param name="value">The value.</param>
    /// <returns>False if there is none.</returns>
    public bool TryTake(out T value)
    {
        if (_read == Volatile.Read(ref _written))
        {
            value = default!;
            return false;
        }

        value = _places[_read & _mask];
        _places[_read & _mask] = default!;
        Volatile.Write(ref _read, _read + 1);
        return true;
    }
}
