namespace Stochastic.Chains.Kernels;

/// <summary>
/// The counter-based generator Philox 4×32 with ten rounds: a bijection of 128 bits that a key of 64 bits selects. Block number n of a stream is found
/// without the blocks before it. Source: Salmon, Moraes, Dror and Shaw (2011), Parallel random numbers: as easy as 1, 2, 3, Proc. SC11.
/// </summary>
internal static class Philox
{
    private const int Rounds = 10;
    private const uint FirstMultiplier = 0xD2511F53;
    private const uint SecondMultiplier = 0xCD9E8D57;
    private const uint FirstKeyStep = 0x9E3779B9; // the golden ratio
    private const uint SecondKeyStep = 0xBB67AE85; // √3 − 1

    /// <summary>The 128 bits that belong to a counter and a key; words of 32 bits count from the low end.</summary>
    internal static (ulong Low, ulong High) Block(ulong counterLow, ulong counterHigh, ulong key)
    {
        var (c0, c1, c2, c3) = ((uint)counterLow, (uint)(counterLow >> 32), (uint)counterHigh, (uint)(counterHigh >> 32));
        var (k0, k1) = ((uint)key, (uint)(key >> 32));
        for (var round = 0; round < Rounds; round++)
        {
            var first = (ulong)FirstMultiplier * c0;
            var second = (ulong)SecondMultiplier * c2;
            (c0, c1, c2, c3) = ((uint)(second >> 32) ^ c1 ^ k0, (uint)second, (uint)(first >> 32) ^ c3 ^ k1, (uint)first);
            unchecked
            {
                (k0, k1) = (k0 + FirstKeyStep, k1 + SecondKeyStep);
            }
        }

        return (c0 | ((ulong)c1 << 32), c2 | ((ulong)c3 << 32));
    }
}
