using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>The parts of a positive double: value = Bits · 2^Exponent with an integer of at most 53 bits.</summary>
internal readonly record struct Significand(ulong Bits, int Exponent)
{
    private const int FractionBits = 52;
    private const int ExponentMask = 0x7FF;
    private const int ExponentBias = 1075;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static Significand Of(double value)
    {
        var raw = BitConverter.DoubleToUInt64Bits(value);
        var fraction = raw & ((1UL << FractionBits) - 1);
        var biased = (int)(raw >> FractionBits) & ExponentMask;
        return biased == 0
            ? new Significand(fraction, 1 - ExponentBias)
            : new Significand(fraction | (1UL << FractionBits), biased - ExponentBias);
    }
}
