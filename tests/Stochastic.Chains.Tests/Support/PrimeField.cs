using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// Arithmetic modulo a prime below 2^62. Elements are held in Montgomery form (Montgomery, Math. Comp. 44 (1985) 519-521), so that a
/// product costs three multiplications and no division.
/// </summary>
internal sealed class PrimeField
{
    private readonly ulong _inverseOfPrime;
    private readonly ulong _radixSquared;
    private ulong[]? _powersOfTwo;

    public PrimeField(ulong prime)
    {
        Prime = prime;
        var inverse = prime;
        for (var correctBits = 3; correctBits < 64; correctBits *= 2)
        {
            inverse *= 2 - (prime * inverse);
        }

        _inverseOfPrime = inverse;
        var radix = (ulong)((UInt128.One << 64) % prime);
        _radixSquared = (ulong)((UInt128)radix * radix % prime);
        One = radix;
    }

    public ulong Prime { get; }

    /// <summary>The element 1.</summary>
    public ulong One { get; }

    public ulong Add(ulong left, ulong right) => Lift(left + right - Prime, Prime);

    public ulong Subtract(ulong left, ulong right) => Lift(left - right, Prime);

    /// <summary>One factor may be any 64-bit number as long as the other is an element.</summary>
    public ulong Multiply(ulong left, ulong right)
    {
        var high = Math.BigMul(left, right, out var low);
        var correction = Math.BigMul(low * _inverseOfPrime, Prime, out _);
        return Lift(high - correction, Prime);
    }

    public ulong Power(ulong value, ulong exponent)
    {
        var result = One;
        for (var bit = 63 - BitOperations.LeadingZeroCount(exponent); bit >= 0; bit--)
        {
            result = Multiply(result, result);
            if (((exponent >> bit) & 1) != 0)
            {
                result = Multiply(result, value);
            }
        }

        return result;
    }

    /// <summary>By Fermat's little theorem; zero has no inverse.</summary>
    public ulong Inverse(ulong value) => value != 0
        ? Power(value, Prime - 2)
        : throw new DivideByZeroException($"A pivot is a multiple of the prime {Prime}; the exact answer needs another prime.");

    public ulong PowerOfTwo(int exponent)
    {
        _powersOfTwo ??= FirstPowersOfTwo();
        return exponent < _powersOfTwo.Length ? _powersOfTwo[exponent] : Power(_powersOfTwo[1], (ulong)exponent);
    }

    public ulong FromInteger(ulong value) => Multiply(value, _radixSquared);

    public ulong FromInteger(BigInteger value) => FromInteger((ulong)(value % Prime));

    public ulong ToInteger(ulong element) => Multiply(element, 1);

    /// <summary>target[columns[k]] -= factor * values[k], for all k: the inner loop of elimination.</summary>
    public void SubtractMultiple(ulong factor, ReadOnlySpan<ulong> values, ReadOnlySpan<int> columns, Span<ulong> target)
    {
        var (prime, inverse) = (Prime, _inverseOfPrime);
        for (var k = 0; k < values.Length; k++)
        {
            var high = Math.BigMul(factor, values[k], out var low);
            var correction = Math.BigMul(low * inverse, prime, out _);
            ref var entry = ref target[columns[k]];
            entry = Lift(entry - Lift(high - correction, prime), prime);
        }
    }

    /// <summary>
    /// Miller-Rabin with the first twelve primes, which decides every number below 2^64 (Sorenson and Webster, Math. Comp. 86 (2017)
    /// 985-1003, from memory).
    /// </summary>
    public static bool IsPrime(ulong candidate)
    {
        ulong[] smallPrimes = [2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37];
        foreach (var prime in smallPrimes)
        {
            if (candidate % prime == 0)
            {
                return candidate == prime;
            }
        }

        return Array.TrueForAll(smallPrimes, witness => PassesMillerRabin(candidate, witness));
    }

    /// <summary>Adds the prime to a difference below zero, without a branch (it would be guessed wrong half the time).</summary>
    private static ulong Lift(ulong difference, ulong prime) => difference + (prime & (ulong)((long)difference >> 63));

    /// <summary>Enough for the exponents of a double and its remainder.</summary>
    private ulong[] FirstPowersOfTwo()
    {
        var powers = new ulong[2200];
        powers[0] = One;
        for (var exponent = 1; exponent < powers.Length; exponent++)
        {
            powers[exponent] = Add(powers[exponent - 1], powers[exponent - 1]);
        }

        return powers;
    }

    private static bool PassesMillerRabin(ulong candidate, ulong witness)
    {
        var field = new PrimeField(candidate);
        var minusOne = field.Subtract(0, field.One);
        var twos = BitOperations.TrailingZeroCount(candidate - 1);
        var power = field.Power(field.FromInteger(witness), (candidate - 1) >> twos);
        if (power == field.One || power == minusOne)
        {
            return true;
        }

        for (var square = 1; square < twos; square++)
        {
            power = field.Multiply(power, power);
            if (power == minusOne)
            {
                return true;
            }
        }

        return false;
    }
}
