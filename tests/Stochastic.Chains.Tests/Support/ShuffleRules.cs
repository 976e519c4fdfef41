using System.Numerics;

namespace Stochastic.Chains.Tests.Support;

/// <summary>Card shuffling.</summary>
internal static class ShuffleRules
{
    /// <summary>Rising sequences minus one from a sorted deck: 2^-n C(n + 1, 2i + 1 - j) A(j)/A(i), A the Eulerian numbers.</summary>
    public static PublishedChain RiffleRisingSequences(int cards)
    {
        var eulerian = EulerianNumbers(cards);
        return Square(cards, (i, j) => new Rational(
            Binomial(cards + 1, (2 * i) + 1 - j) * eulerian[j],
            (BigInteger.One << cards) * eulerian[i]));
    }

    /// <summary>Descents, the same as carries in addition: 2^-n C(n + 1, 2j - i + 1); the other riffle chain reversed.</summary>
    public static PublishedChain RiffleDescents(int cards) =>
        Square(cards, (i, j) => new Rational(Binomial(cards + 1, (2 * j) - i + 1), BigInteger.One << cards));

    /// <summary>Eulerian numbers by their recurrence A(m, k) = (k + 1) A(m - 1, k) + (m - k) A(m - 1, k - 1).</summary>
    public static BigInteger[] EulerianNumbers(int order)
    {
        var numbers = new BigInteger[order];
        numbers[0] = 1;
        for (var m = 2; m <= order; m++)
        {
            for (var k = m - 1; k > 0; k--)
            {
                numbers[k] = ((k + 1) * numbers[k]) + ((m - k) * numbers[k - 1]);
            }
        }

        return numbers;
    }

    /// <summary>All orders of a few cards, lexicographic; the top card is inserted at a uniform position, the top included.</summary>
    public static PublishedChain TopToRandom(int cards)
    {
        string[] decks = [.. Orders("", string.Concat(Enumerable.Range(0, cards)))];
        return PublishedChain.FromEntries(
            decks.Length,
            decks.SelectMany((deck, from) => Enumerable.Range(0, cards).Select(position =>
                (from, Array.IndexOf(decks, deck[1..].Insert(position, deck[..1])), new Rational(1, cards)))));
    }

    /// <summary>Cards at or below the original bottom card (state 0 is one card): k to k + 1 with k/n, absorbed at n.</summary>
    public static PublishedChain BottomCardRises(int cards) => PublishedChain.FromOffDiagonals(
        cards,
        Enumerable.Range(1, cards - 1).Select(k => (k - 1, k, new Rational(k, cards))));

    private static PublishedChain Square(int count, Func<int, int, Rational> entry) =>
        PublishedChain.FromRows([.. Enumerable.Range(0, count).Select(i => Enumerable.Range(0, count).Select(j => entry(i, j)).ToArray())]);

    private static BigInteger Binomial(int upper, int lower) => lower < 0 || lower > upper
        ? BigInteger.Zero
        : Enumerable.Range(1, lower).Aggregate(BigInteger.One, (value, k) => value * (upper - lower + k) / k);

    private static IEnumerable<string> Orders(string placed, string left) => left.Length == 0
        ? [placed]
        : left.SelectMany((card, i) => Orders(placed + card, left.Remove(i, 1)));
}
