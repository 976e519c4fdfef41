using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>Where the tiles of a right operand lie: packed side by side, or still in their matrix.</summary>
internal readonly ref struct ColumnTiles<TKernel>
    where TKernel : struct, ITileKernel
{
    private readonly ref double _first;
    private readonly nint _perColumn;

    private ColumnTiles(ref double first, nint perColumn, nint stride)
    {
        _first = ref first;
        _perColumn = perColumn;
        Stride = stride;
    }

    /// <summary>The distance between rows of a tile.</summary>
    internal nint Stride { get; }

    /// <summary>The tile that begins in a column, a multiple of TileColumns.</summary>
    internal ref double this[int column] => ref Unsafe.Add(ref _first, column * _perColumn);

    /// <summary>The tiles of <see cref="ColumnPanels{TKernel}"/> of a depth.</summary>
    internal static ColumnTiles<TKernel> Packed(ref double panels, int depth) => new(ref panels, depth, TKernel.TileColumns);

    /// <summary>The whole tiles of a matrix.</summary>
    internal static ColumnTiles<TKernel> Of(MatrixView matrix) => new(ref matrix[0, 0], 1, matrix.Stride);
}
