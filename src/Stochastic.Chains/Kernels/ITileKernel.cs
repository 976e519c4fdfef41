namespace Stochastic.Chains.Kernels;

/// <summary>
/// The inner loops of dense elimination and multiplication for one instruction set.
/// </summary>
/// <remarks>
/// Operands are packed. A row panel holds <see cref="Width"/> rows as consecutive squares of Width x Width numbers, row by row inside a
/// square, so that packing copies whole vectors. A column panel holds its columns side by side, row after row. Each multiply-add rounds once where the machine has a fused multiply-add and at most twice elsewhere; sums run over the depth in
/// ascending order, so the result depends on nothing but the operands.
/// </remarks>
internal interface ITileKernel
{
    /// <summary>Doubles in a vector, rows of a tile, and side of a square of a row panel.</summary>
    static abstract int Width { get; }

    /// <summary>Columns of a tile and of a column panel; a multiple of <see cref="Width"/>.</summary>
    static abstract int TileColumns { get; }

    /// <summary>
    /// Adds the product of a row panel (Width x depth) and a column panel (depth x TileColumns) to a target tile. The rows of the column
    /// panel lie <paramref name="columnStride"/> doubles apart, TileColumns when it is packed; the rows of the target lie
    /// <paramref name="rowStride"/> and whose vectors lie <paramref name="vectorStride"/> doubles apart. The operands are read completely
    /// before the target is written.
    /// </summary>
    static abstract void AddTile(
        ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride, nint vectorStride);

    /// <summary>As <see cref="AddTile"/>, for one vector of columns out of a column panel.</summary>
    static abstract void AddNarrowTile(ref double rowPanel, ref double columnPanel, nint columnStride, int depth, ref double target, nint rowStride);

    /// <summary>
    /// Adds factors (rows x Width, row by row) times source (Width x vectors·Width, as consecutive squares) to the target. Rows are
    /// finished from the last to the first, and a vector of sources is read before the same vector of a group of targets is written: the
    /// source may be its own target when row i of the factors is zero from column i on.
    /// </summary>
    static abstract void AddRows(
        ref double target, nint rowStride, nint vectorStride, int rows, int vectors, ref double factors, ref double source);
}
