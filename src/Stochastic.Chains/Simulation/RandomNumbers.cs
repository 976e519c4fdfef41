using Stochastic.Chains.Internal;
using Stochastic.Chains.Kernels;

namespace Stochastic.Chains;

/// <summary>A stream of random numbers, fixed by a seed and the number of the stream: the same integers on every machine and in every version.</summary>
/// <remarks>
/// <para>
/// The generator is Philox 4×32 with ten rounds (Salmon, Moraes, Dror and Shaw 2011). The seed is its key; the number of the stream is the high half of its
/// counter and the position in the stream the low half, so that streams of one seed never overlap: each has 2⁶⁵ numbers of its own, and there are 2⁶⁴ streams.
/// One block of 128 bits gives two numbers of 64 bits, the low one first.
/// </para>
/// <para>
/// What is made from the integers by multiplying, such as <see cref="NextDouble"/>, is the same everywhere too; what goes through logarithms is the same on one
/// platform. Not for secrets. A stream is used by one thread at a time: give each piece of work a stream of its own.
/// </para>
/// </remarks>
/// <example>
/// <code>
/// var stream = new RandomNumbers(seed: 42, number: 7);
/// double between0And1 = stream.NextDouble();
/// int side = stream.NextIndex(6) + 1;
/// </code>
/// </example>
public sealed class RandomNumbers
{
    private const double UnitOfDouble = 1.0 / (1L << 53);

    private readonly ulong _key;
    private readonly ulong _number;
    private ulong _block;
    private ulong _second;
    private bool _hasSecond;

    /// <summary>Starts the stream number 0 of a seed.</summary>
    /// <param name="seed">Any number.</param>
    public RandomNumbers(long seed)
        : this(seed, 0)
    {
    }

    /// <summary>Starts one of the independent streams of a seed.</summary>
    /// <param name="seed">Any number.</param>
    /// <param name="number">The number of the stream, any.</param>
    public RandomNumbers(long seed, long number)
    {
        Seed = seed;
        Number = number;
        _key = (ulong)seed;
        _number = (ulong)number;
    }

    /// <summary>Gets the seed.</summary>
    public long Seed { get; }

    /// <summary>Gets the number of the stream.</summary>
    public long Number { get; }

    /// <summary>Draws 64 random bits.</summary>
    public ulong NextBits()
    {
        if (_hasSecond)
        {
            _hasSecond = false;
            return _second;
        }

        (var first, _second) = Philox.Block(_block++, _number, _key);
        _hasSecond = true;
        return first;
    }

    /// <summary>Draws a number from 0 to below 1, one of 2⁵³ with equal distances.</summary>
    public double NextDouble() => (NextBits() >> 11) * UnitOfDouble;

    /// <summary>Draws one of the first whole numbers, all equally likely, without bias.</summary>
    /// <param name="count">How many there are, 1 or more: the result is from 0 to <paramref name="count"/> − 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The count is below 1.</exception>
    /// <remarks>Source: Lemire (2019), ACM Trans. Model. Comput. Simul. 29(1), 3.</remarks>
    public int NextIndex(int count)
    {
        if (count < 1)
        {
            throw new ArgumentOutOfRangeException(nameof(count), count, Messages.NothingToDraw);
        }

        var range = (ulong)count;
        var product = (UInt128)NextBits() * range;
        if ((ulong)product < range)
        {
            var rejected = (0 - range) % range;
            while ((ulong)product < rejected)
            {
                product = (UInt128)NextBits() * range;
            }
        }

        return (int)(ulong)(product >> 64);
    }
}
