using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Multiplies packed panels into a row-major target, edges included.</summary>
internal static class PanelProduct<TKernel>
    where TKernel : struct, ITileKernel
{
    /// <summary>Adds the product of row panels of a depth (rows x inner) and tiles (inner x columns) to the target.</summary>
    internal static void Add(ref double rowPanels, ColumnTiles<TKernel> tiles, int depth, int inner, MatrixView target, int rows, int columns)
    {
        var whole = rows / TKernel.Width * TKernel.Width;
        for (var row = 0; row < whole; row += TKernel.Width)
        {
            AddPanel(ref Unsafe.Add(ref rowPanels, (nint)row * depth), tiles, depth, inner, target.From(row, 0), columns);
        }

        if (whole < rows)
        {
            AddLastPanel(
                ref Unsafe.Add(ref rowPanels, (nint)whole * depth), tiles, depth, inner, target.From(whole, 0), rows - whole, columns);
        }
    }

    private static bool IsHalf(int edge) => TKernel.Width == 2 * HalfTiles512.Side && edge <= HalfTiles512.Side;

    private static void AddPanel(ref double rowPanel, ColumnTiles<TKernel> tiles, int depth, int inner, MatrixView target, int columns)
    {
        var column = 0;
        for (; column + TKernel.TileColumns <= columns; column += TKernel.TileColumns)
        {
            TKernel.AddTile(
                ref rowPanel, ref tiles[column], tiles.Stride, inner, ref target[0, column], target.Stride, TKernel.Width);
        }

        ref var columnPanel = ref tiles[column];
        for (; column + TKernel.Width <= columns; column += TKernel.Width)
        {
            TKernel.AddNarrowTile(ref rowPanel, ref columnPanel, tiles.Stride, inner, ref target[0, column], target.Stride);
            columnPanel = ref Unsafe.Add(ref columnPanel, TKernel.Width);
        }

        if (column < columns)
        {
            AddLastColumns(ref rowPanel, ref columnPanel, tiles.Stride, inner, target.From(0, column), columns - column);
        }
    }

    private static void AddLastColumns(ref double rowPanel, ref double columnPanel, nint stride, int inner, MatrixView target, int columns)
    {
        if (IsHalf(columns) && columns == HalfTiles512.Side)
        {
            HalfTiles512.AddThinTile(ref rowPanel, ref columnPanel, stride, inner, ref target[0, 0], target.Stride);
            return;
        }

        Span<double> tile = stackalloc double[TKernel.Width * TKernel.Width];
        tile.Clear();
        if (IsHalf(columns))
        {
            HalfTiles512.AddThinTile(ref rowPanel, ref columnPanel, stride, inner, ref tile[0], TKernel.Width);
        }
        else
        {
            TKernel.AddNarrowTile(ref rowPanel, ref columnPanel, stride, inner, ref tile[0], TKernel.Width);
        }

        AddRows(ref tile[0], TKernel.Width, target, TKernel.Width, columns);
    }

    private static void AddLastPanel(ref double rowPanel, ColumnTiles<TKernel> tiles, int depth, int inner, MatrixView target, int rows, int columns)
    {
        Span<double> tile = stackalloc double[TKernel.Width * TKernel.TileColumns];
        for (var column = 0; column < columns; column += TKernel.TileColumns)
        {
            ref var columnPanel = ref tiles[column];
            tile.Clear();
            if (IsHalf(rows))
            {
                HalfTiles512.AddLowTile(ref rowPanel, ref columnPanel, tiles.Stride, inner, ref tile[0], TKernel.TileColumns);
            }
            else
            {
                TKernel.AddTile(ref rowPanel, ref columnPanel, tiles.Stride, inner, ref tile[0], TKernel.TileColumns, TKernel.Width);
            }

            AddRows(ref tile[0], TKernel.TileColumns, target.From(0, column), rows, Math.Min(TKernel.TileColumns, columns - column));
        }
    }

    /// <summary>Adds the part of a tile that lies inside the target.</summary>
    private static void AddRows(ref double tile, int stride, MatrixView target, int rows, int columns)
    {
        for (var row = 0; row < rows; row++)
        {
            ref var source = ref Unsafe.Add(ref tile, row * stride);
            ref var sum = ref target[row, 0];
            nint column = 0;
            for (; column + Vector256<double>.Count <= columns; column += Vector256<double>.Count)
            {
                ref var place = ref Unsafe.Add(ref sum, column);
                (Vector256.LoadUnsafe(ref place) + Vector256.LoadUnsafe(ref Unsafe.Add(ref source, column))).StoreUnsafe(ref place);
            }

            for (; column < columns; column++)
            {
                Unsafe.Add(ref sum, column) += Unsafe.Add(ref source, column);
            }
        }
    }
}
