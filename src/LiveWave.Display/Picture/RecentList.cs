namespace LiveWave.Display;

/// <summary>The last values of a kind: the oldest goes when there is no more room.</summary>
/// <typeparam name="T">What is kept.</typeparam>
internal sealed class RecentList<T>
{
    private readonly T[] _places;

    /// <summary>Makes an empty list.</summary>
    /// <param name="capacity">Values it keeps, at least 1.</param>
    public RecentList(int capacity) => _places = new T[capacity];

    /// <summary>Values ever added.</summary>
    public long Added { get; private set; }

    /// <summary>Values kept.</summary>
    public int Count => (int)Math.Min(Added, _places.Length);

    /// <summary>A value, counted back from the newest.</summary>
    /// <param name="back">0: the newest; below <see cref="Count"/>.</param>
    public ref T this[int back] => ref _places[(Added - 1 - back) % _places.Length];

    /// <summary>Adds a value.</summary>
    /// <param name="value">The newest from now on.</param>
    public void Add(T value) => _places[Added++ % _places.Length] = value;
}
