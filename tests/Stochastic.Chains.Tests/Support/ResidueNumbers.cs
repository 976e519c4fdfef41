using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// Finds non-negative integers of known size from their residues modulo enough primes (Chinese remainder theorem, in Garner's mixed-radix
/// form). Determinants and solutions of integer systems come out exactly, without ever forming a large intermediate fraction.
/// </summary>
internal static class ResidueNumbers
{
    private const int BitsPerPrime = 61;
    private static readonly Lock Gate = new();
    private static readonly List<PrimeModulus> Moduli = [];

    /// <summary>The integers whose residues <paramref name="residues"/> computes in one field; each must be in [0, 2^bits).</summary>
    public static BigInteger[] Find(long bits, Func<PrimeField, ulong[]> residues)
    {
        var moduli = Take(checked((int)((bits / BitsPerPrime) + 1)));
        var digits = Array.ConvertAll(moduli, modulus => Array.ConvertAll(residues(modulus.Field), modulus.Field.ToInteger));
        for (var later = 1; later < moduli.Length; later++)
        {
            for (var earlier = 0; earlier < later; earlier++)
            {
                TakeOutDigit(moduli[later], earlier, digits[earlier], digits[later]);
            }
        }

        var products = ProductsOf(moduli, 0, moduli.Length);
        return [.. Enumerable.Range(0, digits[0].Length).Select(number => Assemble(digits, products, number, 0, moduli.Length))];
    }

    /// <summary>later := (later - digit) / earlier prime, modulo the later prime, for every number at once.</summary>
    private static void TakeOutDigit(PrimeModulus modulus, int earlier, ulong[] digit, ulong[] later)
    {
        var field = modulus.Field;
        var inverse = modulus.InversesOfEarlierPrimes[earlier];
        for (var number = 0; number < later.Length; number++)
        {
            // All primes are close below 2^62, so one subtraction brings an earlier digit below a later prime.
            var reduced = digit[number] >= field.Prime ? digit[number] - field.Prime : digit[number];
            later[number] = field.Multiply(field.Subtract(later[number], reduced), inverse);
        }
    }

    /// <summary>Digits start..end-1 of one number, by halves as the products are.</summary>
    private static BigInteger Assemble(ulong[][] digits, PrimeProducts products, int number, int start, int end)
    {
        if (end - start == 1)
        {
            return digits[start][number];
        }

        var middle = (start + end) / 2;
        return Assemble(digits, products.Low!, number, start, middle)
            + (products.Low!.Value * Assemble(digits, products.High!, number, middle, end));
    }

    private static PrimeProducts ProductsOf(PrimeModulus[] moduli, int start, int end)
    {
        if (end - start == 1)
        {
            return new(moduli[start].Field.Prime, null, null);
        }

        var low = ProductsOf(moduli, start, (start + end) / 2);
        var high = ProductsOf(moduli, (start + end) / 2, end);
        return new(low.Value * high.Value, low, high);
    }

    /// <summary>The first primes below 2^62, counted downwards; found once and kept.</summary>
    private static PrimeModulus[] Take(int count)
    {
        lock (Gate)
        {
            var candidate = Moduli.Count == 0 ? (1UL << 62) - 1 : Moduli[^1].Field.Prime - 2;
            for (; Moduli.Count < count; candidate -= 2)
            {
                if (PrimeField.IsPrime(candidate))
                {
                    var field = new PrimeField(candidate);
                    Moduli.Add(new(field, [.. Moduli.Select(earlier => field.Inverse(field.FromInteger(earlier.Field.Prime)))]));
                }
            }

            return [.. Moduli.Take(count)];
        }
    }

    private sealed record PrimeProducts(BigInteger Value, PrimeProducts? Low, PrimeProducts? High);

    private sealed record PrimeModulus(PrimeField Field, ulong[] InversesOfEarlierPrimes);
}
