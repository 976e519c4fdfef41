namespace CratePoolLog;

/// <summary>
/// A small seeded generator of random numbers, the same on every machine: whole-number arithmetic only. Steele, Lea and Flood,
/// Fast splittable pseudorandom number generators, OOPSLA 2014.
/// </summary>
internal sealed class SplitMix64(ulong seed)
{
    private ulong _state = seed;

    /// <summary>A whole number from 0 to bound − 1. The bias of the remainder is below bound / 2⁶⁴.</summary>
    internal int Below(int bound) => (int)(Next() % (ulong)bound);

    /// <summary>Whether something that happens in so many cases out of 10,000 happens now.</summary>
    internal bool Happens(int inTenThousand) => Below(10_000) < inTenThousand;

    private ulong Next()
    {
        _state += 0x9E3779B97F4A7C15;
        var mixed = (_state ^ (_state >> 30)) * 0xBF58476D1CE4E5B9;
        mixed = (mixed ^ (mixed >> 27)) * 0x94D049BB133111EB;
        return mixed ^ (mixed >> 31);
    }
}
