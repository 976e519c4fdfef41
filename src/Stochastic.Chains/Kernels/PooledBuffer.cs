using System.Buffers;
using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Working memory from the shared array pool that begins on a cache line when rented. The collector may move the array later: that costs
/// speed, never correctness. The content is undefined until written.
/// </summary>
internal sealed class PooledBuffer : IDisposable
{
    private const int DoublesPerLine = 8;

    private double[]? _values;

    private PooledBuffer(double[] values, int start)
    {
        _values = values;
        Start = start;
    }

    /// <summary>The rented array.</summary>
    internal double[] Values => _values ?? throw new ObjectDisposedException(nameof(PooledBuffer));

    /// <summary>Index of the first number of the buffer inside <see cref="Values"/>.</summary>
    internal int Start { get; }

    /// <summary>A reference to one number of the buffer.</summary>
    internal ref double this[int index] => ref Values[Start + index];

    /// <summary>Rents a buffer whose number at index <paramref name="alignedIndex"/> begins a cache line.</summary>
    internal static PooledBuffer Rent(int length, int alignedIndex = 0)
    {
        var values = ArrayPool<double>.Shared.Rent(length + DoublesPerLine - 1);
        var address = Unsafe.ByteOffset(ref Unsafe.NullRef<double>(), ref values[0]) / sizeof(double);
        var start = (int)(-(address + alignedIndex) & (DoublesPerLine - 1));
        return new PooledBuffer(values, start);
    }

    /// <summary>A part of the buffer.</summary>
    internal Span<double> Slice(int index, int count) => Values.AsSpan(Start + index, count);

    /// <summary>Gives the array back to the pool.</summary>
    public void Dispose()
    {
        if (_values is { } rented)
        {
            _values = null;
            ArrayPool<double>.Shared.Return(rented);
        }
    }
}
