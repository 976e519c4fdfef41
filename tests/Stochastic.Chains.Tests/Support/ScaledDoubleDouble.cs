namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// A non-negative number (high + low) · 2^exponent with high in [1, 2) or zero: about 32 digits and any magnitude. Sums, products and
/// quotients carry a relative error below 2^-102 (Dekker, Numer. Math. 18 (1971) 224-242; Joldes, Muller and Popescu, ACM TOMS 44 (2017),
/// from memory). There is no subtraction, so nothing can cancel.
/// </summary>
internal readonly struct ScaledDoubleDouble
{
    private readonly double _high;
    private readonly double _low;
    private readonly int _exponent;

    private ScaledDoubleDouble(double high, double low, int exponent)
    {
        var sum = high + low;
        var rest = low - (sum - high);
        if (sum >= 2)
        {
            (sum, rest, exponent) = (sum * 0.5, rest * 0.5, exponent + 1);
        }
        else if (sum is < 1 and > 0)
        {
            (sum, rest, exponent) = (sum * 2, rest * 2, exponent - 1);
        }

        (_high, _low, _exponent) = (sum, rest, exponent);
    }

    public static ScaledDoubleDouble Zero => default;

    public static ScaledDoubleDouble One => FromDouble(1);

    public bool IsZero => _high == 0;

    public static ScaledDoubleDouble operator +(ScaledDoubleDouble left, ScaledDoubleDouble right)
    {
        if (left.IsZero || right.IsZero)
        {
            return left.IsZero ? right : left;
        }

        var (large, small) = left._exponent >= right._exponent ? (left, right) : (right, left);
        var gap = large._exponent - small._exponent;
        if (gap > 160)
        {
            return large;
        }

        var scale = BitConverter.Int64BitsToDouble((1023L - gap) << 52);
        var (sum, error) = TwoSum(large._high, small._high * scale);
        return new(sum, error + (large._low + (small._low * scale)), large._exponent);
    }

    public static ScaledDoubleDouble operator *(ScaledDoubleDouble left, ScaledDoubleDouble right)
    {
        if (left.IsZero || right.IsZero)
        {
            return default;
        }

        var product = left._high * right._high;
        var error = Math.FusedMultiplyAdd(left._high, right._high, -product);
        error += (left._high * right._low) + (left._low * right._high);
        return new(product, error, left._exponent + right._exponent);
    }

    public static ScaledDoubleDouble operator /(ScaledDoubleDouble left, ScaledDoubleDouble right)
    {
        if (right.IsZero)
        {
            throw new DivideByZeroException("Division by zero in double-double arithmetic.");
        }

        if (left.IsZero)
        {
            return default;
        }

        var quotient = left._high / right._high;
        var remainder = Math.FusedMultiplyAdd(-quotient, right._high, left._high) + (left._low - (quotient * right._low));
        return new(quotient, remainder / right._high, left._exponent - right._exponent);
    }

    public static ScaledDoubleDouble FromDouble(double value)
    {
        if (!(value >= 0 && double.IsFinite(value)))
        {
            throw new ArgumentOutOfRangeException(nameof(value), value, "Only a finite non-negative number can be held.");
        }

        return value == 0 ? default : new(Math.ScaleB(value, -Math.ILogB(value)), 0, Math.ILogB(value));
    }

    /// <summary>The nearest double (rounded twice in the subnormal range).</summary>
    public double ToDouble() => Math.ScaleB(_high, _exponent);

    /// <summary>The exact value held.</summary>
    public Rational ToRational() =>
        (Rational.FromDouble(_high) + Rational.FromDouble(_low)) * Rational.Pow(2, _exponent);

    /// <summary>|value - this| / this; zero against zero is 0, anything else against zero or not finite is infinite.</summary>
    public double RelativeDifference(double value)
    {
        if (!double.IsFinite(value))
        {
            return double.PositiveInfinity;
        }

        if (IsZero || value == 0)
        {
            return IsZero ? (value == 0 ? 0 : double.PositiveInfinity) : 1;
        }

        var exponent = Math.ILogB(value);
        var scaled = Math.ScaleB(Math.ScaleB(value, -exponent), Math.Min(exponent - _exponent, 1000));
        return Math.Abs(scaled - _high - _low) / _high;
    }

    private static (double Sum, double Error) TwoSum(double left, double right)
    {
        var sum = left + right;
        var part = sum - left;
        return (sum, left - (sum - part) + (right - part));
    }
}
