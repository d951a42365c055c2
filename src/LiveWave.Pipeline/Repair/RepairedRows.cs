using LiveWave.Abstractions;

namespace LiveWave.Pipeline;

/// <summary>The rows of one block after repair: when each is. One writer, <see cref="StreamRepair"/>.</summary>
public sealed class RepairedRows
{
    private readonly RowInstant[] _instants;

    /// <summary>Makes room for a block.</summary>
    /// <param name="capacityRows">The block's capacity.</param>
    public RepairedRows(int capacityRows) => _instants = new RowInstant[capacityRows];

    /// <summary>Rows of the block.</summary>
    public int Count { get; internal set; }

    /// <summary>When a row is.</summary>
    /// <param name="row">0 to <see cref="Count"/> − 1.</param>
    public ref readonly RowInstant this[int row] => ref _instants[row];

    internal void Set(int row, in RowInstant instant) => _instants[row] = instant;
}
