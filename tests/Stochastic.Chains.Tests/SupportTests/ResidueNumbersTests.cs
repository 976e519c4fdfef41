using System.Numerics;
using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.SupportTests;

public class ResidueNumbersTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(61)]
    [InlineData(62)]
    [InlineData(63)]
    [InlineData(1000)]
    [InlineData(5000)]
    public void Integers_come_back_from_their_residues(int bits)
    {
        var random = new SplitMix64((ulong)bits);
        BigInteger[] numbers = [0, 1, (BigInteger.One << bits) - 1, .. Enumerable.Range(0, 20).Select(_ => Below(bits, random))];

        ResidueNumbers.Find(bits, field => Array.ConvertAll(numbers, field.FromInteger)).Should().Equal(numbers);
    }

    [Fact]
    public void Field_arithmetic_agrees_with_whole_number_arithmetic()
    {
        var random = new SplitMix64(7);
        var field = new PrimeField((1UL << 61) - 1);
        for (var trial = 0; trial < 2000; trial++)
        {
            var (a, b) = (random.NextInteger() % field.Prime, random.NextInteger() % field.Prime);
            var (x, y) = (field.FromInteger(a), field.FromInteger(b));

            field.ToInteger(field.Multiply(x, y)).Should().Be((ulong)((UInt128)a * b % field.Prime));
            field.ToInteger(field.Add(x, y)).Should().Be((a + b) % field.Prime);
            field.Add(field.Subtract(x, y), y).Should().Be(x);
            field.Multiply(x, field.Inverse(x)).Should().Be(field.One);
            new ScaledInteger(new BigInteger(a) << 700).In(field).Should().Be(field.FromInteger(new BigInteger(a) << 700));
        }
    }

    /// <summary>Mersenne primes, Carmichael numbers, least strong pseudoprimes to the first bases (from memory).</summary>
    [Fact]
    public void Primes_are_told_from_numbers_that_look_like_them()
    {
        ulong[] primes = [3, (1UL << 31) - 1, (1UL << 61) - 1];
        ulong[] others = [9, 561, 41041, 825265, 3215031751, 341550071728321, 3825123056546413051];

        primes.Should().OnlyContain(number => PrimeField.IsPrime(number));
        others.Should().OnlyContain(number => !PrimeField.IsPrime(number));
        Enumerable.Range(3, 5000).Where(number => number % 2 == 1).Should().OnlyContain(
            number => PrimeField.IsPrime((ulong)number) == Enumerable.Range(2, 70).All(d => d >= number || number % d != 0));
    }

    [Fact]
    public void A_zero_pivot_is_an_error_and_not_an_answer() =>
        FluentActions.Invoking(() => new PrimeField((1UL << 61) - 1).Inverse(0)).Should().Throw<DivideByZeroException>();

    private static BigInteger Below(int bits, SplitMix64 random)
    {
        var value = BigInteger.Zero;
        for (var filled = 0; filled < bits; filled += 64)
        {
            value = (value << 64) + random.NextInteger();
        }

        return value & ((BigInteger.One << bits) - 1);
    }
}
