using System.Runtime.Intrinsics;

namespace Stochastic.Chains.Kernels;

/// <summary>The vector width a kernel runs with. Every choice is correct on every machine; the widest accelerated one is the fastest.</summary>
internal enum InstructionSet
{
    /// <summary>The widest set that the machine accelerates.</summary>
    Widest,

    /// <summary>Vectors of eight doubles.</summary>
    Vector512,

    /// <summary>Vectors of four doubles.</summary>
    Vector256,

    /// <summary>Vectors of two doubles, which every machine has or imitates cheaply.</summary>
    Portable,
}

/// <summary>Finds the instruction set that stands behind <see cref="InstructionSet.Widest"/>.</summary>
internal static class InstructionSets
{
    /// <summary>Returns <paramref name="requested"/>, or the widest accelerated set in place of <see cref="InstructionSet.Widest"/>.</summary>
    internal static InstructionSet Resolve(InstructionSet requested)
    {
        if (requested != InstructionSet.Widest)
        {
            return requested;
        }

        if (Vector512.IsHardwareAccelerated)
        {
            return InstructionSet.Vector512;
        }

        return Vector256.IsHardwareAccelerated ? InstructionSet.Vector256 : InstructionSet.Portable;
    }
}
