using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>The two ways across: a double is read exactly, and a fraction is rounded once, to nearest, ties to even.</summary>
internal readonly partial struct Rational
{
    private const int SignificandBits = 53;
    private const int SmallestExponent = -1074;
    private const int LargestExponent = 971;

    /// <summary>The exact value of a finite double; no rounding takes place.</summary>
    public static Rational FromDouble(double value)
    {
        if (!double.IsFinite(value))
        {
            throw new ArgumentOutOfRangeException(nameof(value), value, "Only a finite double is a rational number.");
        }

        var bits = BitConverter.DoubleToInt64Bits(value);
        var biased = (int)((bits >> 52) & 0x7FF);
        var fraction = bits & ((1L << 52) - 1);
        var significand = biased == 0 ? fraction : fraction | (1L << 52);
        if (significand == 0)
        {
            return Zero;
        }

        var exponent = Math.Max(biased, 1) - 1075;
        var spare = BitOperations.TrailingZeroCount(significand);
        BigInteger odd = bits < 0 ? -(significand >> spare) : significand >> spare;
        exponent += spare;
        return exponent >= 0 ? new(odd << exponent, BigInteger.One) : new(odd, BigInteger.One << -exponent);
    }

    /// <summary>
    /// The nearest double, ties to even: subnormal below 2^-1022 and infinite from 2^1024 - 2^970 on, as IEEE 754 rounds.
    /// </summary>
    public double ToDouble()
    {
        if (Sign == 0)
        {
            return 0;
        }

        var numerator = BigInteger.Abs(Numerator);
        var unit = (int)(numerator.GetBitLength() - Denominator.GetBitLength()) - SignificandBits;
        var quotient = RoundedQuotient(numerator, Denominator, ref unit);
        var magnitude = unit > LargestExponent ? double.PositiveInfinity : Math.ScaleB((double)quotient, unit); // exact
        return Sign < 0 ? -magnitude : magnitude;
    }

    /// <summary>
    /// |value - this| / |this|, computed exactly and rounded once. Zero against zero is 0; anything else against zero, and a value that is
    /// not finite, is infinitely far away.
    /// </summary>
    public double RelativeDifference(double value) =>
        double.IsFinite(value) ? RelativeDistance(FromDouble(value)) : double.PositiveInfinity;

    /// <summary>The same for an exact value, without reducing long fractions.</summary>
    public double RelativeDistance(Rational value)
    {
        if (IsZero)
        {
            return value.IsZero ? 0 : double.PositiveInfinity;
        }

        var mine = Numerator * value.Denominator;
        return new Rational(BigInteger.Abs((value.Numerator * Denominator) - mine), BigInteger.Abs(mine)).ToDouble();
    }

    /// <summary>The integer nearest to the quotient in units of 2^unit, of 53 bits (fewer in the subnormal range).</summary>
    private static BigInteger RoundedQuotient(BigInteger numerator, BigInteger denominator, ref int unit)
    {
        while (true)
        {
            unit = Math.Max(unit, SmallestExponent);
            var dividend = unit < 0 ? numerator << -unit : numerator;
            var divisor = unit > 0 ? denominator << unit : denominator;
            var quotient = BigInteger.DivRem(dividend, divisor, out var remainder);
            if (quotient.GetBitLength() > SignificandBits)
            {
                unit++;
                continue;
            }

            var half = (remainder << 1).CompareTo(divisor);
            return half > 0 || (half == 0 && !quotient.IsEven) ? quotient + 1 : quotient;
        }
    }
}
