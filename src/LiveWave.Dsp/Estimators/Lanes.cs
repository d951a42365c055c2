using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace LiveWave.Dsp;

/// <summary>Padded rows seen as vectors of four channels: loops over them need no tail, and give the same bits at every vector width.</summary>
internal static class Lanes
{
    /// <summary>A whole padded row.</summary>
    internal static Span<Vector256<double>> Of(double[] row) => Of(row.AsSpan());

    /// <summary>A padded row.</summary>
    internal static Span<Vector256<double>> Of(Span<double> row) => MemoryMarshal.Cast<double, Vector256<double>>(row);

    /// <summary>A padded row that is only read.</summary>
    internal static ReadOnlySpan<Vector256<double>> Of(ReadOnlySpan<double> row) => MemoryMarshal.Cast<double, Vector256<double>>(row);
}
