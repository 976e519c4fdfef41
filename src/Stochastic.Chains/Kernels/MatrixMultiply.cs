namespace Stochastic.Chains.Kernels;

/// <summary>
/// Dense matrix multiply: target += left · right. For non-negative operands every entry of a product of inner dimension m carries a relative
/// error of at most (m + m/192 + 1)·u, u = 2^-53, with fused multiply-adds, u more per multiply-add otherwise.
/// </summary>
internal static class MatrixMultiply
{
    /// <summary>Inner dimension of a pass: two panels of it fit a first-level cache.</summary>
    private const int PassDepth = 192;

    /// <summary>Rows and columns of a piece of shared work, a multiple of every tile; a packed piece fits a second-level cache.</summary>
    private const int Group = 192;

    /// <summary>With so few rows and so short a sum the right operand is read where it is: packing it costs more than it saves.</summary>
    private const int FewRows = 128;

    /// <summary>
    /// Adds left (rows x inner) times right (inner x columns) to target (rows x columns), which must not overlap them. The result does not
    /// depend on the number of threads behind <paramref name="sharing"/>.
    /// </summary>
    /// <exception cref="OperationCanceledException">Cancellation was requested; the target is then partly updated.</exception>
    internal static void Add(
        MatrixView left, MatrixView right, MatrixView target, int rows, int inner, int columns, InstructionSet instructions, WorkSharing sharing)
    {
        switch (InstructionSets.Resolve(instructions))
        {
            case InstructionSet.Vector512:
                Add<TileKernel512>(left, right, target, rows, inner, columns, sharing);
                break;
            case InstructionSet.Vector256:
                Add<TileKernel256>(left, right, target, rows, inner, columns, sharing);
                break;
            default:
                Add<TileKernelPortable>(left, right, target, rows, inner, columns, sharing);
                break;
        }
    }

    private static void Add<TKernel>(
        MatrixView left, MatrixView right, MatrixView target, int rows, int inner, int columns, WorkSharing sharing)
        where TKernel : struct, ITileKernel
    {
        if (rows == 0 || columns == 0 || inner == 0)
        {
            return;
        }

        if (rows <= FewRows && inner <= FewRows)
        {
            sharing.Cancellation.ThrowIfCancellationRequested();
            AddToFewRows<TKernel>(left, right, target, rows, inner, columns);
            return;
        }

        var deepest = RoundUp(Math.Min(inner, PassDepth), TKernel.Width);
        using var columnPanels = PooledBuffer.Rent(checked(ColumnPanels<TKernel>.Size(columns, deepest)));
        for (var start = 0; start < inner; start += PassDepth)
        {
            var width = Math.Min(PassDepth, inner - start);
            var depth = RoundUp(width, TKernel.Width);
            var first = start;
            sharing.Run(Groups(columns), group =>
            {
                var column = group * Group;
                ColumnPanels<TKernel>.Pack(
                    right.From(first, column), width, Math.Min(Group, columns - column), depth, ref columnPanels[column * depth]);
            });
            sharing.Run(Groups(rows), group =>
            {
                var row = group * Group;
                var height = Math.Min(Group, rows - row);
                using var rowPanels = PooledBuffer.Rent(RowPanels<TKernel>.Size(height, depth));
                RowPanels<TKernel>.Pack(left.From(row, first), height, width, depth, ref rowPanels[0]);
                PanelProduct<TKernel>.Add(
                    ref rowPanels[0], ColumnTiles<TKernel>.Packed(ref columnPanels[0], depth), depth, width, target.From(row, 0), height, columns);
            });
        }
    }

    /// <summary>Packing whole tiles of the right operand would not pay: a few rows do not read them often enough.</summary>
    private static void AddToFewRows<TKernel>(MatrixView left, MatrixView right, MatrixView target, int rows, int inner, int columns)
        where TKernel : struct, ITileKernel
    {
        var depth = RoundUp(inner, TKernel.Width);
        var whole = columns / TKernel.TileColumns * TKernel.TileColumns;
        using var panels = PooledBuffer.Rent(RowPanels<TKernel>.Size(rows, depth) + ColumnPanels<TKernel>.Size(columns - whole, depth));
        ref var rowPanels = ref panels[0];
        RowPanels<TKernel>.Pack(left, rows, inner, depth, ref rowPanels);
        PanelProduct<TKernel>.Add(ref rowPanels, ColumnTiles<TKernel>.Of(right), depth, inner, target, rows, whole);
        if (whole < columns)
        {
            ref var rest = ref panels[RowPanels<TKernel>.Size(rows, depth)];
            ColumnPanels<TKernel>.Pack(right.From(0, whole), inner, columns - whole, depth, ref rest);
            PanelProduct<TKernel>.Add(
                ref rowPanels, ColumnTiles<TKernel>.Packed(ref rest, depth), depth, inner, target.From(0, whole), rows, columns - whole);
        }
    }

    private static int Groups(int extent) => (extent + Group - 1) / Group;

    private static int RoundUp(int number, int multiple) => (number + multiple - 1) / multiple * multiple;
}
