namespace Stochastic.Chains.Kernels;

/// <summary>
/// A pooled table in the layout that elimination likes best: rows a whole number of cache lines apart, but not a multiple of a memory page
/// (such rows evict each other from the caches), and the trailing columns of every block beginning on a cache line.
/// </summary>
internal sealed class WorkTable : IDisposable
{
    private const int DoublesPerLine = 8;
    private const int DoublesPerPage = 512;

    private readonly PooledBuffer _buffer;

    private WorkTable(PooledBuffer buffer, int stride)
    {
        _buffer = buffer;
        View = new MatrixView(buffer.Values, buffer.Start, stride);
    }

    /// <summary>The table; its content is undefined until written.</summary>
    internal MatrixView View { get; }

    /// <summary>Rents a table of the given extent.</summary>
    internal static WorkTable Rent(int rows, int columns)
    {
        var stride = PreferredStride(columns);
        return new WorkTable(PooledBuffer.Rent(checked(rows * stride), columns % DoublesPerLine), stride);
    }

    /// <summary>The distance between rows that a table of so many columns should have.</summary>
    internal static int PreferredStride(int columns)
    {
        var stride = (columns + DoublesPerLine - 1) / DoublesPerLine * DoublesPerLine;
        return stride % DoublesPerPage == 0 ? stride + DoublesPerLine : stride;
    }

    /// <summary>Gives the memory back to the pool.</summary>
    public void Dispose() => _buffer.Dispose();
}
