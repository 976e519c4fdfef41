using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Packs a matrix as the right operand of a multiply: panels of TileColumns columns, each stored row after row, padded with zeros. Rows of
/// the matrix are walked from end to end, which memory likes best.
/// </summary>
internal static class ColumnPanels<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>Numbers in the panels of so many columns.</summary>
    internal static int Size(int columns, int depth) => (columns + TKernel.TileColumns - 1) / TKernel.TileColumns * TKernel.TileColumns * depth;

    /// <summary>Copies rows x columns entries into panels of the given depth, not less than rows.</summary>
    internal static void Pack(MatrixView source, int rows, int columns, int depth, ref double panels)
    {
        for (var row = 0; row < depth; row++)
        {
            ref var target = ref Unsafe.Add(ref panels, row * TKernel.TileColumns);
            var column = 0;
            for (; row < rows && column + TKernel.TileColumns <= columns; column += TKernel.TileColumns)
            {
                CopyRow(ref source[row, column], ref target);
                target = ref Unsafe.Add(ref target, (nint)TKernel.TileColumns * depth);
            }

            for (; column < columns; column += TKernel.TileColumns)
            {
                PackRest(row < rows ? source.Row(row, column, Math.Min(TKernel.TileColumns, columns - column)) : [], ref target);
                target = ref Unsafe.Add(ref target, (nint)TKernel.TileColumns * depth);
            }
        }
    }

    /// <summary>Copies panels of the given depth back to rows x columns entries.</summary>
    internal static void Unpack(ref double panels, int depth, MatrixView target, int rows, int columns)
    {
        for (var row = 0; row < rows; row++)
        {
            ref var source = ref Unsafe.Add(ref panels, row * TKernel.TileColumns);
            var column = 0;
            for (; column + TKernel.TileColumns <= columns; column += TKernel.TileColumns)
            {
                CopyRow(ref source, ref target[row, column]);
                source = ref Unsafe.Add(ref source, (nint)TKernel.TileColumns * depth);
            }

            for (var inside = 0; column < columns; column++, inside++)
            {
                target[row, column] = Unsafe.Add(ref source, inside);
            }
        }
    }

    /// <summary>Writes the sum and the least nonzero number of each row; the order of addition depends on the layout only.</summary>
    internal static void MeasureRows(ref double panels, int columns, int depth, ref double sums, ref double smallest)
    {
        for (var row = 0; row < depth; row++)
        {
            ref var source = ref Unsafe.Add(ref panels, row * TKernel.TileColumns);
            var sum = Vector256<double>.Zero;
            var least = Vector256.Create(double.PositiveInfinity);
            for (var column = 0; column < columns; column += TKernel.TileColumns)
            {
                var inner = Vector256<double>.Zero;
                for (nint lane = 0; lane < TKernel.TileColumns; lane += Vector256<double>.Count)
                {
                    var values = Vector256.LoadUnsafe(ref Unsafe.Add(ref source, lane));
                    inner += values;
                    least = NormalRange.SmallestNonzero(least, values);
                }

                sum += inner;
                source = ref Unsafe.Add(ref source, (nint)TKernel.TileColumns * depth);
            }

            Unsafe.Add(ref sums, row) = Vector256.Sum(sum);
            Unsafe.Add(ref smallest, row) = NormalRange.Least(least);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void CopyRow(ref double source, ref double target)
    {
        for (nint lane = 0; lane < TKernel.TileColumns; lane += Vector256<double>.Count)
        {
            Vector256.LoadUnsafe(ref Unsafe.Add(ref source, lane)).StoreUnsafe(ref Unsafe.Add(ref target, lane));
        }
    }

    private static void PackRest(ReadOnlySpan<double> source, ref double target)
    {
        for (var lane = 0; lane < TKernel.TileColumns; lane += Vector256<double>.Count)
        {
            EdgeVector.Of(source, lane).StoreUnsafe(ref Unsafe.Add(ref target, lane));
        }
    }
}
