using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>Four numbers from a sequence that may end among or before them.</summary>
internal static class EdgeVector
{
    /// <summary>The numbers from an index on, zeros behind the end of the sequence.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Vector256<double> Of(ReadOnlySpan<double> values, int index)
    {
        ref var first = ref Unsafe.Add(ref MemoryMarshal.GetReference(values), index);
        return (values.Length - index) switch
        {
            >= 4 => Vector256.LoadUnsafe(ref first),
            3 => Vector256.Create(first, Unsafe.Add(ref first, 1), Unsafe.Add(ref first, 2), 0),
            2 => Vector256.Create(first, Unsafe.Add(ref first, 1), 0, 0),
            1 => Vector256.Create(first, 0, 0, 0),
            _ => Vector256<double>.Zero,
        };
    }
}
