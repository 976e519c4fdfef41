using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Sums of doubles without any rounding, as whole multiples of 2⁻¹⁰⁷⁴.</summary>
internal static class ExactSum
{
    internal static BigInteger Of(IEnumerable<double> terms) => terms.Aggregate(BigInteger.Zero, (sum, term) => sum + Scaled(term));

    /// <summary>The double times 2¹⁰⁷⁴, which is a whole number.</summary>
    internal static BigInteger Scaled(double value)
    {
        var bits = BitConverter.DoubleToInt64Bits(value);
        var exponent = (int)((bits >> 52) & 0x7FF);
        var fraction = bits & 0xF_FFFF_FFFF_FFFF;
        var magnitude = exponent == 0 ? new BigInteger(fraction) : new BigInteger(fraction | (1L << 52)) << (exponent - 1);
        return bits < 0 ? -magnitude : magnitude;
    }
}
