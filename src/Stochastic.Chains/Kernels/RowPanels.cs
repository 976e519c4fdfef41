using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Packs a matrix as the left operand of a multiply: panels of Width rows, each a sequence of Width x Width squares (rows one after
/// another inside a square), padded with zeros.
/// </summary>
internal static class RowPanels<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>Numbers in the panels of so many rows.</summary>
    internal static int Size(int rows, int depth) => (rows + TKernel.Width - 1) / TKernel.Width * TKernel.Width * depth;

    /// <summary>Copies rows x width entries into panels of the given depth, a multiple of Width.</summary>
    internal static void Pack(MatrixView source, int rows, int width, int depth, ref double panels)
    {
        var side = TKernel.Width;
        for (var row = 0; row < rows; row++)
        {
            ref var target = ref Square(ref panels, row, depth);
            var column = 0;
            for (; column + side <= width; column += side)
            {
                CopyRow(ref source[row, column], ref target);
                target = ref Unsafe.Add(ref target, side * side);
            }

            if (column < depth)
            {
                PackRest(source.Row(row, column, width - column), depth - column, ref target);
            }
        }

        for (var row = rows; row % side != 0; row++)
        {
            PackRest([], depth, ref Square(ref panels, row, depth));
        }
    }

    /// <summary>Copies panels of the given depth back to rows x width entries.</summary>
    internal static void Unpack(ref double panels, int depth, MatrixView target, int rows, int width)
    {
        var side = TKernel.Width;
        for (var row = 0; row < rows; row++)
        {
            ref var source = ref Square(ref panels, row, depth);
            var column = 0;
            for (; column + side <= width; column += side)
            {
                CopyRow(ref source, ref target[row, column]);
                source = ref Unsafe.Add(ref source, side * side);
            }

            for (; column < width; column++)
            {
                target[row, column] = Unsafe.Add(ref source, column % side);
            }
        }
    }

    /// <summary>Multiplies each column by its factor.</summary>
    internal static void ScaleColumns(ref double panels, int rows, int depth, ref double scales)
    {
        var side = TKernel.Width;
        for (var panel = 0; panel < rows; panel += side)
        {
            ref var square = ref Square(ref panels, panel, depth);
            for (nint column = 0; column < depth; column += 4)
            {
                var scale = Vector256.LoadUnsafe(ref Unsafe.Add(ref scales, column));
                ref var entry = ref Unsafe.Add(ref square, (column / side * side * side) + (column % side));
                for (nint row = 0; row < side; row++)
                {
                    ref var place = ref Unsafe.Add(ref entry, row * side);
                    (Vector256.LoadUnsafe(ref place) * scale).StoreUnsafe(ref place);
                }
            }
        }
    }

    /// <summary>Lowers and raises the least nonzero and the largest number of each column by the numbers in the panels.</summary>
    internal static void MeasureColumns(ref double panels, int rows, int depth, ref double smallest, ref double largest)
    {
        var side = TKernel.Width;
        for (var panel = 0; panel < rows; panel += side)
        {
            ref var square = ref Square(ref panels, panel, depth);
            for (nint column = 0; column < depth; column += 4)
            {
                ref var least = ref Unsafe.Add(ref smallest, column);
                ref var most = ref Unsafe.Add(ref largest, column);
                var low = Vector256.LoadUnsafe(ref least);
                var high = Vector256.LoadUnsafe(ref most);
                ref var entry = ref Unsafe.Add(ref square, (column / side * side * side) + (column % side));
                for (nint row = 0; row < side; row++)
                {
                    var values = Vector256.LoadUnsafe(ref Unsafe.Add(ref entry, row * side));
                    low = NormalRange.SmallestNonzero(low, values);
                    high = Vector256.MaxNative(high, values);
                }

                low.StoreUnsafe(ref least);
                high.StoreUnsafe(ref most);
            }
        }
    }

    private static ref double Square(ref double panels, int row, int depth)
    {
        var side = TKernel.Width;
        var inside = row % side;
        return ref Unsafe.Add(ref panels, ((nint)(row - inside) * depth) + (inside * side));
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void CopyRow(ref double source, ref double target)
    {
        Vector256.LoadUnsafe(ref source).StoreUnsafe(ref target);
        if (TKernel.Width == 8)
        {
            Vector256.LoadUnsafe(ref source, 4).StoreUnsafe(ref target, 4);
        }
    }

    private static void PackRest(ReadOnlySpan<double> source, int columns, ref double square)
    {
        var side = TKernel.Width;
        for (var column = 0; column < columns; column += Vector256<double>.Count)
        {
            EdgeVector.Of(source, column).StoreUnsafe(ref Unsafe.Add(ref square, (column / side * side * side) + (column % side)));
        }
    }
}
