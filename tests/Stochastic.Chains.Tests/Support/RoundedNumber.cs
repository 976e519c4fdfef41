using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// Zero or a positive number of exactly 256 significant bits and any exponent; every operation rounds down by less than one part in 2^255.
/// </summary>
internal readonly struct RoundedNumber
{
    public const int Bits = 256;

    private readonly BigInteger _significand;
    private readonly long _exponent;

    private RoundedNumber(BigInteger significand, long exponent)
    {
        var excess = Math.Max(0, (int)significand.GetBitLength() - Bits);
        _significand = significand >> excess;
        _exponent = exponent + excess;
    }

    public bool IsZero => _significand.IsZero;

    public static RoundedNumber Quotient(BigInteger numerator, BigInteger denominator)
    {
        var shift = Math.Max(0, Bits + 1 + (int)(denominator.GetBitLength() - numerator.GetBitLength()));
        return new((numerator << shift) / denominator, -shift);
    }

    public static RoundedNumber operator *(RoundedNumber left, RoundedNumber right) =>
        new(left._significand * right._significand, left._exponent + right._exponent);

    public static RoundedNumber operator +(RoundedNumber left, RoundedNumber right)
    {
        if (left.IsZero || right.IsZero)
        {
            return left.IsZero ? right : left;
        }

        var (high, low) = left._exponent >= right._exponent ? (left, right) : (right, left);
        var gap = high._exponent - low._exponent;
        return gap > 2 * Bits ? high : new((high._significand << (int)gap) + low._significand, low._exponent);
    }

    /// <summary>Exact, but zero below about 2^-4700, far below any double: such a fraction could fill the memory.</summary>
    public Rational ToRational() => _exponent switch
    {
        >= 0 => new(_significand << (int)_exponent, BigInteger.One),
        > -5000 => new(_significand, BigInteger.One << (int)-_exponent),
        _ => Rational.Zero,
    };
}
