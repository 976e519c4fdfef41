namespace Stochastic.Chains.Kernels;

/// <summary>
/// A short addition chain: how to make a power with few multiplications. Power 0 is the base; power k is the product of two earlier ones.
/// </summary>
/// <remarks>
/// The best of halving, taking one off and dividing by small primes, as far as the exponent is at most 2¹⁶; above that its binary
/// digits (Knuth, The Art of Computer Programming, vol. 2, 3rd ed. 1997, section 4.6.3). Never more products than by binary digits alone.
/// </remarks>
internal sealed class SquaringChain
{
    private const long LargestSearched = 1 << 16;

    private readonly Dictionary<long, (int Cost, int Divisor)> _best = new() { [1] = (0, 0) };
    private readonly List<(int Left, int Right)> _products = [];

    private SquaringChain(long exponent)
    {
        Append(exponent, 0);
        LastUses = new int[_products.Count + 1];
        for (var product = 0; product < _products.Count; product++)
        {
            LastUses[_products[product].Left] = product;
            LastUses[_products[product].Right] = product;
        }

        LastUses[^1] = _products.Count;
    }

    /// <summary>The factors of the powers after the base, in the order in which they are made.</summary>
    internal IReadOnlyList<(int Left, int Right)> Products => _products;

    /// <summary>The last product that each power, the base included, is a factor of.</summary>
    internal int[] LastUses { get; }

    /// <summary>The chain of an exponent of one or more.</summary>
    internal static SquaringChain For(long exponent) => new(exponent);

    /// <summary>The largest number of powers that must be held at once, the one in the making included.</summary>
    internal int LargestHeld()
    {
        var largest = 1;
        for (var product = 0; product < _products.Count; product++)
        {
            var made = product;
            largest = Math.Max(largest, 1 + Enumerable.Range(0, made + 1).Count(power => LastUses[power] >= made));
        }

        return largest;
    }

    /// <summary>Appends the products that raise a power to an exponent; returns the power made.</summary>
    private int Append(long exponent, int power)
    {
        if (exponent == 1)
        {
            return power;
        }

        var divisor = Best(exponent).Divisor;
        return divisor switch
        {
            1 => Multiply(Append(exponent - 1, power), power),
            2 => Append(exponent / 2, power) is var half ? Multiply(half, half) : power,
            _ => Append(divisor, Append(exponent / divisor, power)),
        };
    }

    private int Multiply(int left, int right)
    {
        _products.Add((left, right));
        return _products.Count;
    }

    /// <summary>The number of products, and the divisor of the first way to reach it; 1 stands for taking one off.</summary>
    private (int Cost, int Divisor) Best(long exponent)
    {
        if (_best.TryGetValue(exponent, out var known))
        {
            return known;
        }

        var best = exponent % 2 == 0 ? (Best(exponent / 2).Cost + 1, 2) : (Best(exponent - 1).Cost + 1, 1);
        if (exponent <= LargestSearched)
        {
            foreach (var prime in (ReadOnlySpan<int>)[3, 5, 7, 11, 13])
            {
                if (exponent % prime == 0 && exponent > prime)
                {
                    var cost = Best(prime).Cost + Best(exponent / prime).Cost;
                    best = cost < best.Item1 ? (cost, prime) : best;
                }
            }
        }

        return _best[exponent] = best;
    }
}
