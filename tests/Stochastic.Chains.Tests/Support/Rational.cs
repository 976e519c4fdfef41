using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// An exact fraction of two integers of any size. A value need not be held in lowest terms (reducing the thousands of digits of an exact
/// answer costs more than finding it), so equality compares by cross multiplication; <see cref="Reduced"/> gives the lowest terms.
/// </summary>
internal readonly partial struct Rational : IEquatable<Rational>, IComparable<Rational>
{
    private readonly BigInteger _denominator;

    public Rational(BigInteger numerator, BigInteger denominator)
    {
        if (denominator.IsZero)
        {
            throw new DivideByZeroException("A rational number needs a denominator other than zero.");
        }

        Numerator = denominator.Sign < 0 ? -numerator : numerator;
        _denominator = BigInteger.Abs(denominator);
    }

    public static Rational Zero => default;

    public static Rational One => new(BigInteger.One, BigInteger.One);

    public BigInteger Numerator { get; }

    /// <summary>Always positive; the default value of the struct is 0/1.</summary>
    public BigInteger Denominator => _denominator.IsZero ? BigInteger.One : _denominator;

    public int Sign => Numerator.Sign;

    public bool IsZero => Numerator.IsZero;

    public static implicit operator Rational(long value) => new(value, BigInteger.One);

    public static Rational operator +(Rational left, Rational right) => left.Denominator == right.Denominator
        ? new Rational(left.Numerator + right.Numerator, left.Denominator).Reduced()
        : new Rational(
            (left.Numerator * right.Denominator) + (right.Numerator * left.Denominator),
            left.Denominator * right.Denominator).Reduced();

    public static Rational operator -(Rational value) => new(-value.Numerator, value.Denominator);

    public static Rational operator -(Rational left, Rational right) => left + (-right);

    public static Rational operator *(Rational left, Rational right) =>
        new Rational(left.Numerator * right.Numerator, left.Denominator * right.Denominator).Reduced();

    public static Rational operator /(Rational left, Rational right) =>
        new Rational(left.Numerator * right.Denominator, left.Denominator * right.Numerator).Reduced();

    public static bool operator ==(Rational left, Rational right) => left.Equals(right);

    public static bool operator !=(Rational left, Rational right) => !left.Equals(right);

    public static bool operator <(Rational left, Rational right) => left.CompareTo(right) < 0;

    public static bool operator >(Rational left, Rational right) => left.CompareTo(right) > 0;

    public static bool operator <=(Rational left, Rational right) => left.CompareTo(right) <= 0;

    public static bool operator >=(Rational left, Rational right) => left.CompareTo(right) >= 0;

    public static Rational Abs(Rational value) => new(BigInteger.Abs(value.Numerator), value.Denominator);

    public static Rational Max(Rational left, Rational right) => left >= right ? left : right;

    public static Rational Pow(Rational value, int exponent) => exponent >= 0
        ? new(BigInteger.Pow(value.Numerator, exponent), BigInteger.Pow(value.Denominator, exponent))
        : new(BigInteger.Pow(value.Denominator, -exponent), BigInteger.Pow(value.Numerator, -exponent));

    /// <summary>The sum over one common denominator, reduced once at the end.</summary>
    public static Rational Sum(IEnumerable<Rational> values)
    {
        var numerator = BigInteger.Zero;
        var denominator = BigInteger.One;
        foreach (var value in values)
        {
            if (value.Denominator == denominator)
            {
                numerator += value.Numerator;
                continue;
            }

            var shared = BigInteger.GreatestCommonDivisor(denominator, value.Denominator);
            var lift = value.Denominator / shared;
            numerator = (numerator * lift) + (value.Numerator * (denominator / shared));
            denominator *= lift;
        }

        return new Rational(numerator, denominator).Reduced();
    }

    public Rational Reduced()
    {
        var divisor = BigInteger.GreatestCommonDivisor(Numerator, Denominator);
        return divisor.IsOne ? this : new(Numerator / divisor, Denominator / divisor);
    }

    public int CompareTo(Rational other)
    {
        if (Sign != other.Sign)
        {
            return Sign.CompareTo(other.Sign);
        }

        return (Numerator * other.Denominator).CompareTo(other.Numerator * Denominator);
    }

    public bool Equals(Rational other) => Sign == other.Sign && (Denominator == other.Denominator
        ? Numerator == other.Numerator
        : Numerator * other.Denominator == other.Numerator * Denominator);

    public override bool Equals(object? obj) => obj is Rational other && Equals(other);

    /// <summary>Equal fractions round to the same double, so the hash does not depend on the terms.</summary>
    public override int GetHashCode() => ToDouble().GetHashCode();
}
