using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace LiveWave.Dsp;

/// <summary>A real matrix, packed in strips of sixteen rows so that a product with a complex vector runs lane by lane.</summary>
/// <remarks>Each lane adds over the columns in their order: the same bits at every vector width.</remarks>
internal sealed class PackedMatrix
{
    private const int Strip = 16;

    private readonly double[] _packed;
    private readonly int _columns;
    private readonly int _strips;

    /// <summary>Packs a matrix.</summary>
    /// <param name="rows">Number of rows, at least 1.</param>
    /// <param name="columns">Number of columns, at least 1.</param>
    /// <param name="valueAt">Value at row and column.</param>
    public PackedMatrix(int rows, int columns, Func<int, int, double> valueAt)
    {
        _columns = columns;
        _strips = Padded(rows) / Strip;
        _packed = new double[_strips * columns * Strip];
        for (var row = 0; row < rows; row++)
        {
            for (var column = 0; column < columns; column++)
            {
                _packed[(row / Strip * columns + column) * Strip + row % Strip] = valueAt(row, column);
            }
        }
    }

    /// <summary>How long a result must be: whole strips.</summary>
    /// <param name="rows">Number of rows.</param>
    public static int Padded(int rows) => (rows + Strip - 1) / Strip * Strip;

    /// <summary>Matrix times complex vector. Does not allocate.</summary>
    /// <param name="re">Real parts, one a column or more.</param>
    /// <param name="im">Imaginary parts.</param>
    /// <param name="outRe">Filled: <see cref="Padded"/> real parts, 0 past the last row.</param>
    /// <param name="outIm">Filled: imaginary parts.</param>
    public void Multiply(ReadOnlySpan<double> re, ReadOnlySpan<double> im, Span<double> outRe, Span<double> outIm)
    {
        re = re[.._columns];
        im = im[.._columns];
        ref var packed = ref MemoryMarshal.GetArrayDataReference(_packed);
        nuint at = 0;
        for (var strip = 0; strip < _strips; strip++)
        {
            Vector256<double> re0 = default, re1 = default, re2 = default, re3 = default;
            Vector256<double> im0 = default, im1 = default, im2 = default, im3 = default;
            for (var column = 0; column < re.Length; column++)
            {
                var (a, b) = (Vector256.Create(re[column]), Vector256.Create(im[column]));
                var row0 = Vector256.LoadUnsafe(ref packed, at);
                var row1 = Vector256.LoadUnsafe(ref packed, at + 4);
                var row2 = Vector256.LoadUnsafe(ref packed, at + 8);
                var row3 = Vector256.LoadUnsafe(ref packed, at + 12);
                at += Strip;
                re0 += row0 * a;
                re1 += row1 * a;
                re2 += row2 * a;
                re3 += row3 * a;
                im0 += row0 * b;
                im1 += row1 * b;
                im2 += row2 * b;
                im3 += row3 * b;
            }

            Store(outRe.Slice(strip * Strip, Strip), re0, re1, re2, re3);
            Store(outIm.Slice(strip * Strip, Strip), im0, im1, im2, im3);
        }
    }

    private static void Store(
        Span<double> into, Vector256<double> v0, Vector256<double> v1, Vector256<double> v2, Vector256<double> v3)
    {
        v0.CopyTo(into);
        v1.CopyTo(into[4..]);
        v2.CopyTo(into[8..]);
        v3.CopyTo(into[12..]);
    }
}
