using System.Runtime.CompilerServices;

namespace Stochastic.Chains.Kernels;

/// <summary>
/// Sums of fixed-point numbers without rounding: each is a row of digits to the base 2³², kept in 64 bits so that carries can wait for up
/// to 2³⁰ additions. What lies below the last digit is cut off each term, always towards zero, so that a term that was added and
/// subtracted leaves nothing. Source of the idea: Kulisch's long accumulator (Kulisch and Miranker 1986).
/// </summary>
internal sealed class ExactSums
{
    private const int DigitBits = 32;
    private const int SpareDigits = 5;
    private const double LeadingError = 1.0 / (1L << 50);

    private readonly long[] _digits;
    private readonly int _width;
    private readonly int _unit;

    /// <summary>Room for so many sums of terms below 2^highest, cut off at 2^unit.</summary>
    internal ExactSums(int count, int unit, int highest)
    {
        _unit = unit;
        _width = Width(unit, highest);
        _digits = new long[checked(count * _width)];
    }

    /// <summary>The memory that so many sums take, in bytes.</summary>
    internal static long Bytes(int count, int unit, int highest) => (long)count * Width(unit, highest) * sizeof(long);

    /// <summary>Takes sign · significand · 2^exponent from one sum and adds it to another; sign is 1 or −1.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal void Move(int from, int to, UInt128 significand, int exponent, long sign)
    {
        var shift = exponent - _unit;
        if (shift < 0)
        {
            if (shift <= -128)
            {
                return;
            }

            significand >>= -shift;
            shift = 0;
        }

        var bit = shift % DigitBits;
        var low = (ulong)significand;
        var high = (ulong)(significand >> 64);
        var middle = ((low >> 1) >> (63 - bit)) | (high << bit);
        var last = sign * (long)((high >> 1) >> (63 - bit));
        low <<= bit;
        var offset = shift / DigitBits;
        var target = _digits.AsSpan((to * _width) + offset, SpareDigits);
        target[4] += last;
        target[3] += sign * (long)(middle >> DigitBits);
        target[2] += sign * (uint)middle;
        target[1] += sign * (long)(low >> DigitBits);
        target[0] += sign * (uint)low;
        var source = _digits.AsSpan((from * _width) + offset, SpareDigits);
        source[4] -= last;
        source[3] -= sign * (long)(middle >> DigitBits);
        source[2] -= sign * (uint)middle;
        source[1] -= sign * (long)(low >> DigitBits);
        source[0] -= sign * (uint)low;
    }

    /// <summary>Takes the product of a positive number and one of either sign from one sum and adds it to another.</summary>
    internal void MoveProduct(int from, int to, double first, double second)
    {
        var left = Significand.Of(first);
        var right = Significand.Of(Math.Abs(second));
        var high = Math.BigMul(left.Bits, right.Bits, out var low);
        Move(from, to, new UInt128(high, low), left.Exponent + right.Exponent, Math.Sign(second));
    }

    /// <summary>Adds one sum to another; the first is left with its carries made.</summary>
    internal void AddSum(int from, int to)
    {
        Carry(from);
        var source = _digits.AsSpan(from * _width, _width);
        var target = _digits.AsSpan(to * _width, _width);
        for (var k = 0; k < source.Length; k++)
        {
            target[k] += source[k];
        }
    }

    /// <summary>The sum times 2^scale, with a relative error below 2⁻⁵⁰.</summary>
    internal double Value(int index, int scale)
    {
        var digits = Carry(index);
        var sign = digits[^1] < 0 ? -1 : 1;
        Span<long> magnitude = stackalloc long[_width];
        return sign * Leading(Magnitude(digits, sign, magnitude), scale);
    }

    /// <summary>An upper bound of the absolute value of the sum times 2^scale.</summary>
    internal double UpperMagnitude(int index, int scale)
    {
        var digits = Carry(index);
        Span<long> magnitude = stackalloc long[_width];
        var leading = Leading(Magnitude(digits, digits[^1] < 0 ? -1 : 1, magnitude), scale);
        return digits.ContainsAnyExcept(0L) ? Upward.Add(leading, Upward.Multiply(leading, LeadingError)) : 0;
    }

    private static int Width(int unit, int highest) => ((highest - unit) / DigitBits) + 1 + SpareDigits;

    private static ReadOnlySpan<long> Magnitude(ReadOnlySpan<long> digits, int sign, Span<long> magnitude)
    {
        for (var k = 0; k < digits.Length; k++)
        {
            magnitude[k] = sign * digits[k];
        }

        Carry(magnitude);
        return magnitude;
    }

    /// <summary>
    /// Three leading digits of a carried number that is not negative, as a double; what was left out is less than 2⁻⁵⁰ of it.
    /// </summary>
    private double Leading(ReadOnlySpan<long> digits, int scale)
    {
        var top = digits.LastIndexOfAnyExcept(0L);
        if (top < 0)
        {
            return 0;
        }

        var leading = (double)digits[top];
        for (var k = top - 1; k >= Math.Max(0, top - 2); k--)
        {
            leading += Math.ScaleB((double)digits[k], DigitBits * (k - top));
        }

        return Math.ScaleB(leading, (DigitBits * top) + _unit + scale);
    }

    private static void Carry(Span<long> digits)
    {
        var carry = 0L;
        for (var k = 0; k < digits.Length - 1; k++)
        {
            var digit = digits[k] + carry;
            carry = digit >> DigitBits;
            digits[k] = digit & uint.MaxValue;
        }

        digits[^1] += carry;
    }

    private ReadOnlySpan<long> Carry(int index)
    {
        var digits = _digits.AsSpan(index * _width, _width);
        Carry(digits);
        return digits;
    }
}
