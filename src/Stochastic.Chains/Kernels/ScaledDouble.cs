using System.Numerics;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// A non-negative number with the 53 bits of a double and an exponent of its own, so that products of many small or large factors
/// neither under- nor overflow. Each operation rounds once.
/// </summary>
internal readonly record struct ScaledDouble :
    IAdditionOperators<ScaledDouble, ScaledDouble, ScaledDouble>,
    IMultiplyOperators<ScaledDouble, ScaledDouble, ScaledDouble>,
    IDivisionOperators<ScaledDouble, ScaledDouble, ScaledDouble>
{
    private const int WidestGap = 64;

    private readonly double _fraction;
    private readonly long _exponent;

    private ScaledDouble(double fraction, long exponent)
    {
        if (fraction == 0)
        {
            return;
        }

        var shift = Math.ILogB(fraction);
        _fraction = Math.ScaleB(fraction, -shift);
        _exponent = exponent + shift;
    }

    internal static ScaledDouble One { get; } = new(1, 0);

    internal bool IsZero => _fraction == 0;

    /// <summary>The power of two of the number: it lies from 2^Exponent up to, not including, 2^(Exponent + 1).</summary>
    internal long Exponent => _exponent;

    public static implicit operator ScaledDouble(double value) => new(value, 0);

    public static ScaledDouble operator *(ScaledDouble first, ScaledDouble second) =>
        new(first._fraction * second._fraction, first._exponent + second._exponent);

    public static ScaledDouble operator /(ScaledDouble first, ScaledDouble second) =>
        new(first._fraction / second._fraction, first._exponent - second._exponent);

    public static ScaledDouble operator +(ScaledDouble first, ScaledDouble second)
    {
        if (first.IsZero || second.IsZero)
        {
            return first.IsZero ? second : first;
        }

        var gap = first._exponent - second._exponent;
        if (gap < 0)
        {
            return second + first;
        }

        return gap > WidestGap ? first : new ScaledDouble(first._fraction + Math.ScaleB(second._fraction, (int)-gap), first._exponent);
    }

    /// <summary>The number times a power of two, as a double; rounded to subnormal, zero or infinity outside the range.</summary>
    internal double ToDouble(long scale = 0) => IsZero ? 0 : Math.ScaleB(_fraction, (int)Math.Clamp(_exponent + scale, -4000, 4000));
}
