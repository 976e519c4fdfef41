namespace Stochastic.Chains.Tests.Support;

/// <summary>
/// The SplitMix64 generator (Steele, Lea and Flood, OOPSLA 2014): the same numbers on every machine, from integer arithmetic alone.
/// </summary>
internal sealed class SplitMix64(ulong seed)
{
    private ulong _state = seed;

    public ulong NextInteger()
    {
        _state += 0x9E3779B97F4A7C15;
        var mixed = _state;
        mixed = (mixed ^ (mixed >> 30)) * 0xBF58476D1CE4E5B9;
        mixed = (mixed ^ (mixed >> 27)) * 0x94D049BB133111EB;
        return mixed ^ (mixed >> 31);
    }

    /// <summary>Uniform in [0, 1), a multiple of 2^-53.</summary>
    public double NextFraction() => (NextInteger() >> 11) * (1.0 / (1UL << 53));

    /// <summary>Uniform in [0.1, 1): a factor that leaves an order of magnitude alone.</summary>
    public double NextFactor() => 0.1 + (0.9 * NextFraction());

    /// <summary>In minimum..maximum, both included (by high multiplication; the bias is below one part in 2^32).</summary>
    public int Next(int minimum, int maximum) =>
        minimum + (int)Math.BigMul(NextInteger(), (ulong)(maximum - minimum + 1), out _);

    public bool NextChance(int oneIn) => Next(1, oneIn) == 1;

    public int[] NextPermutation(int count)
    {
        int[] order = [.. Enumerable.Range(0, count)];
        for (var i = count - 1; i > 0; i--)
        {
            var other = Next(0, i);
            (order[i], order[other]) = (order[other], order[i]);
        }

        return order;
    }
}
