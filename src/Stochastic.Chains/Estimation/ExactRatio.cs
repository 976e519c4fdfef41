namespace Stochastic.Chains.Estimation;

/// <summary>The quotient of two counts, correctly rounded whatever their size.</summary>
internal static class ExactRatio
{
    private const long LargestExactInteger = 1L << 53;
    private const int QuotientBits = 57; // 53 kept, the others decide the rounding together with the sticky bit

    /// <summary>The double nearest to part / whole, for 0 ≤ part ≤ whole and whole above 0.</summary>
    internal static double Of(long part, long whole)
    {
        if (whole <= LargestExactInteger)
        {
            return (double)part / whole; // both are exact doubles, and IEEE-754 division rounds once
        }

        if (part == 0)
        {
            return 0;
        }

        var shift = BitLength(whole) - BitLength(part) + QuotientBits;
        var (quotient, remainder) = UInt128.DivRem((UInt128)part << shift, (UInt128)whole);
        var sticky = remainder == UInt128.Zero ? 0UL : 1UL;
        return Math.ScaleB((double)((ulong)quotient | sticky), -shift);
    }

    private static int BitLength(long value) => 64 - (int)long.LeadingZeroCount(value);
}
