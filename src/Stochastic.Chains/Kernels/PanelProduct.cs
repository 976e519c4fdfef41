using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>Multiplies packed panels into a row-major target, edges included.</summary>
internal static class PanelProduct<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>Adds the product of row panels (rows x depth) and column panels (depth x columns) to the target.</summary>
    internal static void Add(ref double rowPanels, ref double columnPanels, int depth, MatrixView target, int rows, int columns)
    {
        for (var row = 0; row < rows; row += TKernel.Width)
        {
            ref var rowPanel = ref Unsafe.Add(ref rowPanels, (nint)row * depth);
            var wholeRows = row + TKernel.Width <= rows;
            var column = 0;
            for (; wholeRows && column + TKernel.TileColumns <= columns; column += TKernel.TileColumns)
            {
                TKernel.AddTile(
                    ref rowPanel, ref Unsafe.Add(ref columnPanels, (nint)column * depth), depth,
                    ref target[row, column], target.Stride, TKernel.Width);
            }

            for (; column < columns; column += TKernel.Width)
            {
                var inside = column % TKernel.TileColumns;
                ref var columnPanel = ref Unsafe.Add(ref columnPanels, ((nint)(column - inside) * depth) + inside);
                if (wholeRows && column + TKernel.Width <= columns)
                {
                    TKernel.AddNarrowTile(ref rowPanel, ref columnPanel, depth, ref target[row, column], target.Stride);
                }
                else
                {
                    AddEdge(
                        ref rowPanel, ref columnPanel, depth, target.From(row, column),
                        Math.Min(TKernel.Width, rows - row), Math.Min(TKernel.Width, columns - column));
                }
            }
        }
    }

    private static void AddEdge(ref double rowPanel, ref double columnPanel, int depth, MatrixView target, int rows, int columns)
    {
        Span<double> tile = stackalloc double[TKernel.Width * TKernel.Width];
        tile.Clear();
        TKernel.AddNarrowTile(ref rowPanel, ref columnPanel, depth, ref tile[0], TKernel.Width);
        for (var row = 0; row < rows; row++)
        {
            for (var column = 0; column < columns; column++)
            {
                target[row, column] += tile[(row * TKernel.Width) + column];
            }
        }
    }
}
